import { union } from '../../../shared/schedule/intervals.ts';
import { intersect, type Interval } from '../../../shared/time.ts';
import { crowded, margins } from './open-pieces.ts';
import type { CompileSetting, PassPieces, Piece } from './pass-pieces.ts';

/** Where a piece may meet others: only there is it worth trimming. */
export interface Contention {
  /** In the time of what legs hold (set-up, tear-down included): more passes than channels. */
  crowds: Interval[];
  /** In the time of the legs themselves: beams too close to another's, or more uplinks than transmit beams. */
  meetings: Interval[];
}

const CALM: Contention = { crowds: [], meetings: [] };

function push<K>(
  map: Map<K, Map<string, Interval[]>>,
  key: K,
  passId: string,
  span: Interval,
): void {
  const byPass = map.get(key) ?? new Map<string, Interval[]>();
  map.set(key, byPass);
  byPass.set(passId, [...(byPass.get(passId) ?? []), span]);
}

/** Instants at which more than `capacity` of the passes and fixed things could be on. */
const overfull = (
  byPass: ReadonlyMap<string, Interval[]> | undefined,
  fixed: readonly Interval[],
  capacity: number,
): Interval[] =>
  crowded([...[...(byPass?.values() ?? [])].flatMap((own) => union(own)), ...fixed], capacity + 1);

/** What contends for the same channels, beams and transmit limits, over all pieces of the day. */
export function findContention(
  setting: CompileSetting,
  all: readonly PassPieces[],
): (pieces: PassPieces, piece: Piece) => Contention {
  const { context, fixed, groups } = setting;
  const held = new Map<number, Map<string, Interval[]>>();
  const beams = new Map<string, Map<string, Interval[]>>();
  for (const { pass, satellite, receive, transmit } of all)
    for (const piece of [...receive, ...transmit]) {
      const { group, fromMs, toMs } = piece;
      const [before, after] = margins(group, satellite);
      push(held, group.index, pass.id, { fromMs: fromMs - before, toMs: toMs + after });
      push(beams, `${group.faceId}|${group.direction}`, pass.id, { fromMs, toMs });
    }
  const crowds = groups.map((group) => {
    const taken = group.channels.flatMap(({ id }) => fixed.heldOn(id));
    return overfull(held.get(group.index), taken, group.channels.length);
  });
  const fullBeams = new Map(
    context.day.faces.map((face) => {
      const on = fixed.legsOn(face.id, 'transmit').map(({ leg }) => leg);
      return [face.id, overfull(beams.get(`${face.id}|transmit`), on, face.transmitBeamLimit)];
    }),
  );
  return ({ pass, satellite }, piece) => {
    const { faceId, direction, index } = piece.group;
    const others = beams.get(`${faceId}|${direction}`);
    const close = context.conflictsOf(pass.id, faceId, direction).flatMap((conflict) => {
      const other = conflict.passIds.find((id) => id !== pass.id) ?? '';
      const meets = others?.get(other)?.some((span) => intersect(span, conflict)) ?? false;
      const during = meets ? intersect(conflict, piece) : null;
      return during ? [during] : [];
    });
    const full = direction === 'transmit' ? (fullBeams.get(faceId) ?? []) : [];
    const meetings = [...close, ...full.flatMap((span) => intersect(span, piece) ?? [])];
    const [before, after] = margins(piece.group, satellite);
    const whole = { fromMs: piece.fromMs - before, toMs: piece.toMs + after };
    const around = (crowds[index] ?? []).flatMap((crowd) => intersect(crowd, whole) ?? []);
    return around.length + meetings.length === 0 ? CALM : { crowds: around, meetings };
  };
}
