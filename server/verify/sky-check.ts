import { directionOnFace } from '../../shared/array/face-geometry.ts';
import { gratingLobeOnsetRad } from '../../shared/array/hard-end.ts';
import { scanLossDb } from '../../shared/array/scan-loss.ts';
import { directionAt, lookAnglesAt } from '../../shared/orbit/track.ts';
import { marginOf, type Looked } from './link-check.ts';
import type {
  DayModel,
  Direction,
  FaceModel,
  PassModel,
  StationModel,
} from '../../shared/schedule/model.ts';

/** What one face can do with a satellite at one instant, from the track alone. */
export interface Sight {
  /** Every condition of a usable window holds. */
  usable: boolean;
  /** The direction lies within the hard end of the face. */
  withinHardEnd: boolean;
}

/** Tracks and faces agree with themselves to far better than this, dB and deg. */
const TOLERANCE = 1e-6;

const around = (deg: number): number => ((deg % 360) + 360) % 360;

function maskDeg({ horizonMask }: StationModel, azimuthDeg: number): number {
  if (horizonMask.length === 0) return -90;
  const knots = horizonMask.toSorted((a, b) => a.azimuthDeg - b.azimuthDeg);
  for (const [index, knot] of knots.entries()) {
    const next = knots[(index + 1) % knots.length] ?? knot;
    const span = around(next.azimuthDeg - knot.azimuthDeg) || 360;
    const along = around(azimuthDeg - knot.azimuthDeg);
    if (along <= span)
      return knot.elevationDeg + ((next.elevationDeg - knot.elevationDeg) * along) / span;
  }
  return 0;
}

const inKeepOut = (station: StationModel, azimuthDeg: number, elevationDeg: number): boolean =>
  station.keepOutSectors.some((sector) => {
    const width = around(sector.azimuthToDeg - sector.azimuthFromDeg) || 360;
    const along = around(azimuthDeg - sector.azimuthFromDeg);
    return (
      along > TOLERANCE &&
      along < width - TOLERANCE &&
      elevationDeg > sector.elevationFromDeg + TOLERANCE &&
      elevationDeg < sector.elevationToDeg - TOLERANCE
    );
  });

/** The limit of the day, or the loosest of the mission's own lines. */
function limitDb(day: DayModel, missionId: string): number {
  let loosest: number | null = null;
  for (const line of day.requirements) {
    if (line.missionId !== missionId) continue;
    if (line.stationId !== null && line.stationId !== day.station.id) continue;
    loosest = Math.max(loosest ?? -Infinity, line.scanLossLimitDb ?? day.limitOfDayDb);
  }
  return loosest ?? day.limitOfDayDb;
}

/** The margin floor: the loosest of the mission's own lines, else 0. */
function floorOfMarginDb(day: DayModel, missionId: string): number {
  let loosest: number | null = null;
  for (const line of day.requirements) {
    if (line.missionId !== missionId) continue;
    if (line.stationId !== null && line.stationId !== day.station.id) continue;
    loosest = Math.min(loosest ?? Infinity, line.marginFloorDb ?? 0);
  }
  return loosest ?? 0;
}

/** Looks at a pass on a face, in one direction of the link, instant by instant. */
export function sightOf(
  day: DayModel,
  { pass, face, satellite, direction }: Looked,
): (ms: number) => Sight {
  // An uplink needs its downlink at the same time.
  const directions: Direction[] = direction === 'receive' ? ['receive'] : ['receive', 'transmit'];
  const margins = directions.map((one) => marginOf(day, { pass, face, satellite, direction: one }));
  const floorDb = floorOfMarginDb(day, pass.missionId) - TOLERANCE;
  return (ms) => {
    const sight = geometryAt(day, pass, face, direction, ms);
    if (!sight.usable) return sight;
    return { ...sight, usable: margins.every((marginAt) => marginAt(ms) >= floorDb) };
  };
}

/** Geometry alone at one instant. */
function geometryAt(
  day: DayModel,
  pass: PassModel,
  face: FaceModel,
  direction: Direction,
  ms: number,
): Sight {
  const { azimuthDeg, elevationDeg } = lookAnglesAt(pass.track, ms);
  const { scanAngleRad } = directionOnFace(face, directionAt(pass.track, ms));
  const lossDb = scanLossDb(face, scanAngleRad);
  const band = direction === 'receive' ? face.receiveBandMhz : face.transmitBandMhz;
  const pitchMm = Math.max(face.pitchXMm, face.pitchYMm);
  const lobeRad = band ? gratingLobeOnsetRad(pitchMm, band[1]) : Math.PI / 2;
  const withinHardEnd =
    lossDb !== null && lossDb <= face.hardEndDb + TOLERANCE && scanAngleRad <= lobeRad + TOLERANCE;
  const { station } = day;
  const floorDeg =
    direction === 'receive'
      ? station.receiveElevationFloorDeg
      : Math.max(station.receiveElevationFloorDeg, station.transmitElevationFloorDeg);
  const high =
    elevationDeg >= floorDeg - TOLERANCE &&
    elevationDeg >= maskDeg(station, azimuthDeg) - TOLERANCE;
  const clear = direction === 'receive' || !inKeepOut(station, azimuthDeg, elevationDeg);
  const within = withinHardEnd && (lossDb ?? Infinity) <= limitDb(day, pass.missionId) + TOLERANCE;
  return { usable: within && high && clear, withinHardEnd };
}
