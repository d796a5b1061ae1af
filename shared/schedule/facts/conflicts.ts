import { faceAxes } from '../../array/face-geometry.ts';
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
  UsableWindow,
} from '../model.ts';
import { signalOf, signalStateAt } from './beam-signals.ts';
import { pairConflicts, type FaceSide, type Party } from './pair-conflicts.ts';
import { beamWidths } from './separation.ts';
import { beamBounds, ticksOf } from './ticks.ts';

/** A possible user of a face, with where a leg of it may lie, guard time included, inside its pass. */
interface Beam extends Party {
  spans: Interval[];
}

/** Largest Doppler shift of anything in orbit, as a share of the frequency: 8 km/s. */
const LARGEST_SHIFT = 8 / 299_792;

/** Their bands could overlap once each is shifted. */
function mightOverlap(a: RadioLinkModel, b: RadioLinkModel): boolean {
  const apartMhz = Math.abs(a.frequencyMhz - b.frequencyMhz);
  const shiftMhz = (a.frequencyMhz + b.frequencyMhz) * LARGEST_SHIFT;
  return apartMhz < (a.bandwidthKhz + b.bandwidthKhz) / 2000 + shiftMhz;
}

function conflictsOfBeams(side: FaceSide, beams: readonly Beam[]): ConflictInterval[] {
  const found: ConflictInterval[] = [];
  const entries = beams
    .flatMap((beam) => beam.spans.map((span) => ({ beam, span })))
    .sort((a, b) => a.span.fromMs - b.span.fromMs);
  let active: typeof entries = [];
  for (const entry of entries) {
    active = active.filter((other) => other.span.toMs > entry.span.fromMs);
    for (const other of active) {
      const [one, two] = [other.beam.signal, entry.beam.signal];
      if (one.pass.satelliteId === two.pass.satelliteId) continue;
      if (!mightOverlap(one.radio, two.radio)) continue;
      const common = intersect(other.span, entry.span);
      if (common) found.push(...pairConflicts(side, [other.beam, entry.beam], common));
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

function faceSide(face: FaceModel, direction: Direction): FaceSide {
  const boundsAt = new Map<number, ReturnType<typeof beamBounds>>();
  return {
    face,
    direction,
    axes: faceAxes(face),
    widthsAt: memoised((mhz: number) => beamWidths(face, direction, mhz)),
    boundsOf: (signal) => {
      const known = boundsAt.get(signal.radio.frequencyMhz) ?? beamBounds(signal);
      boundsAt.set(signal.radio.frequencyMhz, known);
      return known;
    },
  };
}

/**
 * While they last, two passes disturb each other on a face more than one of them allows: C/I of each against the other
 * alone, with fluxes, pattern, floor, overlap and polarisation, falls under its need. Exact ends.
 */
export function findConflicts(day: DayModel, windows: readonly UsableWindow[]): ConflictInterval[] {
  const satellites = new Map(day.satellites.map((satellite) => [satellite.id, satellite]));
  const passes = new Map(day.passes.map((pass) => [pass.id, pass]));
  const beamOf = (side: FaceSide, passId: string, own: UsableWindow[]): Beam[] => {
    const { face, direction, axes } = side;
    const pass = passes.get(passId);
    const satellite = pass && satellites.get(pass.satelliteId);
    const signal = pass && satellite && signalOf(face, direction, satellite, pass);
    if (!signal) return [];
    const overhangMs = direction === 'receive' ? guardMs(day.station, satellite) : 0;
    const ticks = ticksOf(signal, signalStateAt(axes, direction, signal));
    return [{ signal, spans: legSpans(own, pass, overhangMs), ticks }];
  };
  return day.faces.flatMap((face) =>
    (['receive', 'transmit'] as const).flatMap((direction) => {
      const side = faceSide(face, direction);
      const byPass = new Map<string, UsableWindow[]>();
      for (const window of windows) {
        if (window.faceId !== face.id || window.direction !== direction) continue;
        byPass.set(window.passId, [...(byPass.get(window.passId) ?? []), window]);
      }
      return conflictsOfBeams(
        side,
        [...byPass].flatMap(([passId, own]) => beamOf(side, passId, own)),
      );
    }),
  );
}
