import { intersect, type Interval } from '../../time.ts';
import { guardMs } from '../holding.ts';
import { union, widen } from '../intervals.ts';
import type {
  ConflictInterval,
  DayModel,
  Direction,
  FaceModel,
  PassModel,
  RadioLinkModel,
  SatelliteModel,
  UsableWindow,
} from '../model.ts';
import { areCoFrequency, radioFor } from '../radio-fit.ts';
import { whereHolds } from './crossings.ts';
import {
  beamWidths,
  requiredHpbw,
  separationSquared,
  taperOf,
  type BeamWidths,
} from './separation.ts';
import { quickSeparation, ticksOf, tickTimes, type TickTrack } from './ticks.ts';

/** One pass as a possible user of a face in a direction. */
interface Beam {
  pass: PassModel;
  radio: RadioLinkModel;
  /** Where a leg may lie, guard time included, inside the pass. */
  spans: Interval[];
  ticks: TickTrack;
}

interface FaceBeams {
  face: FaceModel;
  direction: Direction;
  widthsAt: (frequencyMhz: number) => BeamWidths;
}

function closePair(setting: FaceBeams, a: Beam, b: Beam, span: Interval): ConflictInterval[] {
  const { face, direction } = setting;
  const required = requiredHpbw(taperOf(face, direction));
  const beam = setting.widthsAt(Math.min(a.radio.frequencyMhz, b.radio.frequencyMhz));
  if (quickSeparation(beam, a.ticks, b.ticks, span) > required) return [];
  const squared = separationSquared(beam, a.pass, b.pass);
  const times = tickTimes(span);
  const closer = whereHolds((ms) => required ** 2 - squared(ms), times);
  return closer.map((interval) => {
    const inside = times.filter((ms) => ms > interval.fromMs && ms < interval.toMs);
    const instants = [interval.fromMs, ...inside, interval.toMs];
    const worstAtMs = instants.reduce((worst, ms) => (squared(ms) < squared(worst) ? ms : worst));
    return {
      ...interval,
      faceId: face.id,
      direction,
      passIds: [a.pass.id, b.pass.id],
      worstAtMs,
      separationHpbw: Math.sqrt(squared(worstAtMs)),
      requiredHpbw: required,
      isolationDb: null,
      requiredDb: null,
    };
  });
}

function conflictsOfBeams(setting: FaceBeams, beams: readonly Beam[]): ConflictInterval[] {
  const found: ConflictInterval[] = [];
  const entries = beams
    .flatMap((beam) => beam.spans.map((span) => ({ beam, span })))
    .sort((a, b) => a.span.fromMs - b.span.fromMs);
  let active: typeof entries = [];
  for (const entry of entries) {
    active = active.filter((other) => other.span.toMs > entry.span.fromMs);
    for (const other of active) {
      if (other.beam.pass.satelliteId === entry.beam.pass.satelliteId) continue;
      if (!areCoFrequency(other.beam.radio, entry.beam.radio)) continue;
      const common = intersect(other.span, entry.span);
      if (common) found.push(...closePair(setting, other.beam, entry.beam, common));
    }
    active.push(entry);
  }
  return found;
}

function memoised<K, T>(make: (key: K) => T): (key: K) => T {
  const made = new Map<K, T>();
  return (key) => {
    const known = made.get(key);
    if (known !== undefined) return known;
    const value = make(key);
    made.set(key, value);
    return value;
  };
}

/** Where a leg may lie: windows with the guard time, cut at the ends of the pass. */
function legSpans(windows: readonly Interval[], pass: PassModel, overhangMs: number): Interval[] {
  const wide = union(windows.map((window) => widen(window, overhangMs)));
  return wide.flatMap((span) => intersect(span, pass) ?? []);
}

/** While they last, two co-frequency passes are closer on a face than their beams can be told apart. Exact ends. */
export function findConflicts(day: DayModel, windows: readonly UsableWindow[]): ConflictInterval[] {
  const satellites = new Map(day.satellites.map((satellite) => [satellite.id, satellite]));
  const passes = new Map(day.passes.map((pass) => [pass.id, pass]));
  const ticks = memoised(ticksOf);
  const beamOf = (direction: Direction, passId: string, own: UsableWindow[]): Beam[] => {
    const pass = passes.get(passId);
    const satellite: SatelliteModel | undefined = pass && satellites.get(pass.satelliteId);
    const radio = satellite && radioFor(satellite, direction);
    if (!pass || !satellite || !radio) return [];
    const overhangMs = direction === 'receive' ? guardMs(day.station, satellite) : 0;
    return [{ pass, radio, spans: legSpans(own, pass, overhangMs), ticks: ticks(pass) }];
  };
  return day.faces.flatMap((face) =>
    (['receive', 'transmit'] as const).flatMap((direction) => {
      const widthsAt = memoised((mhz: number) => beamWidths(face, direction, mhz));
      const byPass = new Map<string, UsableWindow[]>();
      for (const window of windows) {
        if (window.faceId !== face.id || window.direction !== direction) continue;
        byPass.set(window.passId, [...(byPass.get(window.passId) ?? []), window]);
      }
      const beams = [...byPass].flatMap(([passId, own]) => beamOf(direction, passId, own));
      return conflictsOfBeams({ face, direction, widthsAt }, beams);
    }),
  );
}
