import { arrayAxialRatioDb, crossPolarDiscriminationDb } from '../../shared/array/cross-polar.ts';
import { directionOnFace } from '../../shared/array/face-geometry.ts';
import { relativeGainDb, type FaceBeam } from '../../shared/array/isolation.ts';
import { faceBeamPattern } from '../../shared/link/face-radio.ts';
import { directionAt, lookAnglesAt } from '../../shared/orbit/track.ts';
import type {
  FaceModel,
  PassModel,
  RadioLinkModel,
  SatelliteModel,
  Violation,
} from '../../shared/schedule/model.ts';
import { secondsOf } from './check-sight.ts';
import { finding } from './finding.ts';
import type { Suspect } from './legs.ts';

/** Ratios agree with themselves to far better than this, dB. */
const TOLERANCE_DB = 1e-6;
const LIGHT_KM_S = 299_792.458;

/** One side of a pair with all it takes to judge it. */
interface Side {
  pass: PassModel;
  satellite: SatelliteModel;
  radio: RadioLinkModel;
  beam: FaceBeam;
}

function sideOf(face: FaceModel, { pass, satellite, direction }: Suspect): Side | null {
  const radio = (direction === 'receive' ? satellite?.downlink : satellite?.uplink) ?? null;
  if (!pass || !satellite || !radio) return null;
  const beam = {
    pattern: faceBeamPattern(face, direction, radio.frequencyMhz),
    scanLossExponent: face.scanLossExponent,
    scanLossTable: face.scanLossTable,
    floorDb: face.sidelobeFloorDb,
  };
  return { pass, satellite, radio, beam };
}

/** Part of the disturber's power inside the victim's band, 0 to 1. */
function overlapShare(victim: Side, other: Side, shiftOf: (side: Side) => number): number {
  const edges = (side: Side): [number, number] => {
    const middle = side.radio.frequencyMhz + shiftOf(side);
    const half = side.radio.bandwidthKhz / 2000;
    return [middle - half, middle + half];
  };
  const [[a, b], [c, d]] = [edges(victim), edges(other)];
  return Math.max(0, Math.min(b, d) - Math.max(a, c)) / (d - c);
}

function polarisationDb(victim: Side, other: Side, scanAngleRad: number): number {
  const [a, b] = [victim.radio.polarisation, other.radio.polarisation];
  if (a === b) return 0;
  if (a === 'linear' || b === 'linear') return 10 * Math.log10(2);
  return crossPolarDiscriminationDb(arrayAxialRatioDb(scanAngleRad));
}

/** C/I of the victim in a downlink, dB: both fluxes through the victim's beam. */
function receivedRatioDb(face: FaceModel, victim: Side, other: Side, ms: number): number {
  const [looks, disturbs] = [
    lookAnglesAt(victim.pass.track, ms),
    lookAnglesAt(other.pass.track, ms),
  ];
  const shift = (side: Side): number => {
    const { rangeRateKmS } = side === victim ? looks : disturbs;
    return (-side.radio.frequencyMhz * rangeRateKmS) / LIGHT_KM_S;
  };
  const share = overlapShare(victim, other, shift);
  if (share === 0) return Infinity;
  const steered = directionOnFace(face, directionAt(victim.pass.track, ms));
  const seen = directionOnFace(face, directionAt(other.pass.track, ms));
  const fluxDb = (side: Side, rangeKm: number): number =>
    side.satellite.downlink.eirpDbw - 20 * Math.log10(rangeKm);
  const carrier = fluxDb(victim, looks.rangeKm);
  const interference =
    fluxDb(other, disturbs.rangeKm) +
    relativeGainDb(victim.beam, steered, seen) +
    10 * Math.log10(share) -
    polarisationDb(victim, other, seen.scanAngleRad);
  return carrier - interference;
}

/** C/I at the victim satellite of an uplink, dB: the other beam's pattern there, both at equal power. */
function transmittedRatioDb(face: FaceModel, victim: Side, other: Side, ms: number): number {
  const share = overlapShare(victim, other, () => 0);
  if (share === 0) return Infinity;
  const steered = directionOnFace(face, directionAt(other.pass.track, ms));
  const seen = directionOnFace(face, directionAt(victim.pass.track, ms));
  // The element pattern points the same way for both beams: the pattern of the array alone counts.
  const flat = { ...other.beam, scanLossExponent: 0, scanLossTable: null };
  const crossDb = polarisationDb(victim, other, seen.scanAngleRad);
  return crossDb - relativeGainDb(flat, steered, seen) - 10 * Math.log10(share);
}

function checkPair(face: FaceModel, a: Suspect, b: Suspect): Violation[] {
  const [one, two] = [sideOf(face, a), sideOf(face, b)];
  if (!one || !two) return [];
  const ratio = a.direction === 'receive' ? receivedRatioDb : transmittedRatioDb;
  const suffers = (victim: Side, other: Side, ms: number): boolean => {
    const needDb = victim.satellite.requiredCOverIDb ?? face.requiredIsolationDb;
    return ratio(face, victim, other, ms) < needDb - TOLERANCE_DB;
  };
  const fromMs = Math.max(a.leg.fromMs, b.leg.fromMs, one.pass.fromMs, two.pass.fromMs);
  const toMs = Math.min(a.leg.toMs, b.leg.toMs, one.pass.toMs, two.pass.toMs);
  if (fromMs >= toMs) return [];
  // The last instant of a half-open interval is just before its end.
  const close = secondsOf(fromMs, toMs - 1).filter(
    (ms) => suffers(one, two, ms) || suffers(two, one, ms),
  );
  const [first, last] = [close[0], close.at(-1)];
  if (first === undefined || last === undefined) return [];
  return [finding('beams-too-close', 'beams too close', [a, b], first, last + 1)];
}

/** Beams of a face and direction that disturb each other, every second in which both are on. */
export function checkBeams(suspects: readonly Suspect[]): Violation[] {
  const found: Violation[] = [];
  for (const [index, a] of suspects.entries())
    for (const b of suspects.slice(index + 1)) {
      const apart = a.leg.toMs <= b.leg.fromMs || b.leg.toMs <= a.leg.fromMs;
      if (apart || (!a.own && !b.own) || a.direction !== b.direction) continue;
      if (a.contact.satelliteId === b.contact.satelliteId) continue;
      if (a.contact.faceId !== b.contact.faceId || !a.face) continue;
      found.push(...checkPair(a.face, a, b));
    }
  return found;
}
