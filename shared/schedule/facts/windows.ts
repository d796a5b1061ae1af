import { faceAxes } from '../../array/face-geometry.ts';
import { scanLossDb } from '../../array/scan-loss.ts';
import { directionAt } from '../../orbit/track.ts';
import type { Interval } from '../../time.ts';
import { dot } from '../../vector.ts';
import { intersectAll } from '../intervals.ts';
import { marginFloorDb, passLinks, reductionsOf } from '../link-facts.ts';
import type {
  ClosureModel,
  DayModel,
  Direction,
  FaceModel,
  HardEndInterval,
  SatelliteModel,
  UsableWindow,
} from '../model.ts';
import { fitsBand, radioFor } from '../radio-fit.ts';
import { hardEndRad, largestScanRad, scanLossLimitDb } from '../scan-limits.ts';
import { extremes } from './crossings.ts';
import { whereMarginHolds } from './margins.ts';
import { samplePass, whereDirectionHolds, type Reading, type SampledPass } from './sampling.ts';
import { scanCondition, sightConditions } from './sight.ts';

const DIRECTIONS: readonly Direction[] = ['receive', 'transmit'];

interface PassSight {
  sampled: SampledPass;
  satellite: SatelliteModel;
  limitDb: number;
  marginFloorDb: number;
}

/** One direction of one face, made once for all passes. */
interface FaceSide {
  face: FaceModel;
  direction: Direction;
  linkOf: ReturnType<typeof passLinks>;
  reductions: ClosureModel[];
}

const faceSide = (day: DayModel, face: FaceModel, direction: Direction): FaceSide => ({
  face,
  direction,
  linkOf: passLinks(day, face, direction),
  reductions: reductionsOf(day, face, direction),
});

const whereAllHold = (conditions: readonly Reading[], sampled: SampledPass): Interval[] =>
  conditions
    .map((condition) => whereDirectionHolds(condition, sampled))
    .reduce((common, intervals) => intersectAll(common, intervals));

/** Scan loss at the least and the largest scan angle of a window. */
function lossRange(sampled: SampledPass, face: FaceModel, window: Interval): [number, number] {
  const { normal } = faceAxes(face);
  const times: number[] = [window.fromMs];
  const cosines: number[] = [dot(directionAt(sampled.pass.track, window.fromMs), normal)];
  for (const [index, ms] of sampled.times.entries()) {
    const direction = sampled.directions[index];
    if (!direction || ms <= window.fromMs || ms >= window.toMs) continue;
    times.push(ms);
    cosines.push(dot(direction, normal));
  }
  times.push(window.toMs);
  cosines.push(dot(directionAt(sampled.pass.track, window.toMs), normal));
  const cosine = (ms: number): number => dot(directionAt(sampled.pass.track, ms), normal);
  const { least, most } = extremes(cosine, times, cosines);
  const loss = (cos: number): number =>
    scanLossDb(face, Math.acos(Math.min(1, cos))) ?? face.hardEndDb;
  return [loss(most), loss(least)];
}

function windowsOnFace(
  sight: PassSight,
  { face, direction, linkOf, reductions }: FaceSide,
  inSight: readonly Interval[],
): UsableWindow[] {
  const { sampled } = sight;
  const link = linkOf(sight.satellite, sampled.pass);
  if (!link) return [];
  const largestRad = largestScanRad(face, direction, sight.limitDb);
  const inScan = whereDirectionHolds(scanCondition(faceAxes(face).normal, largestRad), sampled);
  const margin = { floorDb: sight.marginFloorDb, reductions };
  return intersectAll(inSight, inScan)
    .flatMap((interval) => whereMarginHolds(link, interval, margin))
    .map((part) => {
      const [minScanLossDb, maxScanLossDb] = lossRange(sampled, face, part);
      const key = { passId: sampled.pass.id, faceId: face.id, direction };
      return { ...key, ...part, minScanLossDb, maxScanLossDb };
    });
}

/** Receive windows of a pass on every face that fits, and transmit windows inside them. */
function windowsOfPass(
  day: DayModel,
  sides: readonly FaceSide[],
  sight: PassSight,
): UsableWindow[] {
  const { sampled, satellite } = sight;
  const found: UsableWindow[] = [];
  const inSight = (direction: Direction): Interval[] =>
    whereAllHold(sightConditions(day.station, direction), sampled);
  const [received, transmitted] = [inSight('receive'), inSight('transmit')];
  let onFace: UsableWindow[] = [];
  for (const side of sides) {
    const radio = radioFor(satellite, side.direction);
    const fits = radio && fitsBand(side.face, side.direction, radio);
    // Each face has its receive side first: an uplink lies inside the windows of its downlink.
    if (side.direction === 'receive') onFace = fits ? windowsOnFace(sight, side, received) : [];
    const windows =
      side.direction === 'receive'
        ? onFace
        : fits
          ? windowsOnFace(sight, side, intersectAll(transmitted, onFace))
          : [];
    found.push(...windows);
  }
  return found;
}

function hardEndOfPass(day: DayModel, sampled: SampledPass): HardEndInterval[] {
  return day.faces.flatMap((face) =>
    DIRECTIONS.flatMap((direction) => {
      const condition = scanCondition(faceAxes(face).normal, hardEndRad(face, direction));
      return whereDirectionHolds(condition, sampled).map((interval) => ({
        passId: sampled.pass.id,
        faceId: face.id,
        direction,
        ...interval,
      }));
    }),
  );
}

/** Usable windows of the day's passes and their parts within the hard ends, by exact crossings. */
export function findWindows(day: DayModel): {
  windows: UsableWindow[];
  withinHardEnd: HardEndInterval[];
} {
  const satellites = new Map(day.satellites.map((satellite) => [satellite.id, satellite]));
  const sides = day.faces.flatMap((face) =>
    DIRECTIONS.map((direction) => faceSide(day, face, direction)),
  );
  const windows: UsableWindow[] = [];
  const withinHardEnd: HardEndInterval[] = [];
  for (const pass of day.passes) {
    const satellite = satellites.get(pass.satelliteId);
    if (!satellite) continue;
    const limitDb = scanLossLimitDb(day, pass.missionId);
    const sampled = samplePass(pass);
    const sight = {
      sampled,
      satellite,
      limitDb,
      marginFloorDb: marginFloorDb(day, pass.missionId),
    };
    windows.push(...windowsOfPass(day, sides, sight));
    withinHardEnd.push(...hardEndOfPass(day, sampled));
  }
  return { windows, withinHardEnd };
}
