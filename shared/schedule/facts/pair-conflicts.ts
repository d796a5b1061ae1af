import type { FaceAxes } from '../../array/face-geometry.ts';
import { crossPolarDiscriminationDb, arrayAxialRatioDb } from '../../array/cross-polar.ts';
import type { Interval } from '../../time.ts';
import type { ConflictInterval, Direction, FaceModel } from '../model.ts';
import {
  carrierToInterferenceDb,
  requiredCOverIDb,
  signalStateAt,
  type Signal,
  type SignalState,
} from './beam-signals.ts';
import { whereHolds } from './crossings.ts';
import { requiredHpbw, separationHpbw, taperOf, type BeamWidths } from './separation.ts';
import { fineTimes, suspectParts, type BeamBounds, type TickSignal } from './ticks.ts';

/** One face in one direction, with what is made once for all pairs. */
export interface FaceSide {
  face: FaceModel;
  direction: Direction;
  axes: FaceAxes;
  widthsAt: (frequencyMhz: number) => BeamWidths;
  boundsOf: (signal: Signal) => BeamBounds;
}

/** A signal of the pair with its screen. */
export interface Party {
  signal: Signal;
  ticks: TickSignal;
}

/** How far a victim stays under its need, dB; negative where it has more. */
interface Shortfall {
  shortDb: number;
  victim: Signal;
  ratioDb: number;
  states: [SignalState, SignalState];
}

function shortfallAt(
  { face, direction, axes }: FaceSide,
  [a, b]: readonly [Signal, Signal],
): (ms: number) => Shortfall {
  const [stateOfA, stateOfB] = [
    signalStateAt(axes, direction, a),
    signalStateAt(axes, direction, b),
  ];
  const [needA, needB] = [requiredCOverIDb(face, a.satellite), requiredCOverIDb(face, b.satellite)];
  return (ms) => {
    const states: [SignalState, SignalState] = [stateOfA(ms), stateOfB(ms)];
    const [one, other] = [
      { signal: a, state: states[0] },
      { signal: b, state: states[1] },
    ];
    const ratioA = carrierToInterferenceDb(direction, one, other);
    const ratioB = carrierToInterferenceDb(direction, other, one);
    return needA - ratioA >= needB - ratioB
      ? { shortDb: needA - ratioA, victim: a, ratioDb: ratioA, states }
      : { shortDb: needB - ratioB, victim: b, ratioDb: ratioB, states };
  };
}

/** Widest scan angle counted for discrimination, rad: the least discrimination of any beam. */
const leastDiscriminationDb = (a: Signal, b: Signal): number => {
  const senses = [a.radio.polarisation, b.radio.polarisation];
  const opposite = senses.includes('rhcp') && senses.includes('lhcp');
  return opposite ? crossPolarDiscriminationDb(arrayAxialRatioDb(Math.PI / 2)) : 0;
};

/** While they last, one of two passes has less C/I than it needs on a face, by the other alone. Exact ends. */
export function pairConflicts(
  side: FaceSide,
  [a, b]: readonly [Party, Party],
  span: Interval,
): ConflictInterval[] {
  const { face, direction } = side;
  const signals = [a.signal, b.signal] as const;
  const bounds = signals.map(side.boundsOf);
  const needs = signals.map(({ satellite }) => requiredCOverIDb(face, satellite));
  const screen = {
    span,
    leastNeedDb: Math.max(...needs),
    discriminationDb: leastDiscriminationDb(a.signal, b.signal),
  };
  const parts = suspectParts([a.ticks, b.ticks], bounds, screen);
  if (parts.length === 0) return [];
  const at = shortfallAt(side, signals);
  const apart = (ms: number): [number, number] => {
    const [one, other] = at(ms).states;
    return [one.at.u - other.at.u, one.at.v - other.at.v];
  };
  const lobeU = Math.min(...bounds.map((beam) => beam.lobeU));
  const widths = side.widthsAt(Math.min(a.signal.radio.frequencyMhz, b.signal.radio.frequencyMhz));
  return parts.flatMap((part) => {
    const times = fineTimes(part, apart, lobeU);
    return whereHolds((ms) => at(ms).shortDb, times).map((interval) => {
      const inside = times.filter((ms) => ms > interval.fromMs && ms < interval.toMs);
      const instants = [interval.fromMs, ...inside, interval.toMs];
      const worstAtMs = instants.reduce((w, ms) => (at(ms).shortDb > at(w).shortDb ? ms : w));
      const worst = at(worstAtMs);
      return {
        ...interval,
        faceId: face.id,
        direction,
        passIds: [a.signal.pass.id, b.signal.pass.id],
        victimPassId: worst.victim.pass.id,
        worstAtMs,
        separationHpbw: separationHpbw(widths, worst.states[0].at, worst.states[1].at),
        requiredHpbw: requiredHpbw(taperOf(face, direction)),
        isolationDb: worst.ratioDb,
        requiredDb: requiredCOverIDb(face, worst.victim.satellite),
      };
    });
  });
}
