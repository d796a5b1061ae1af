import { directionOnFace } from '../../../shared/array/face-geometry.ts';
import { scanLossDb } from '../../../shared/array/scan-loss.ts';
import { dopplerHz } from '../../../shared/link/doppler.ts';
import { refractionDeg } from '../../../shared/orbit/refraction.ts';
import { directionAt, lookAnglesAt } from '../../../shared/orbit/track.ts';
import type { FaceModel, UsableWindow } from '../../../shared/schedule/model.ts';
import type { Pass as PassAnswer, PassTrack } from '../../../shared/schemas/pass.ts';
import { SECOND_MS, toIso } from '../../../shared/time.ts';
import { toDegrees } from '../../../shared/units.ts';
import type { PassInForce } from './pass.service.ts';

const presentWindow = (window: UsableWindow): PassAnswer['windows'][number] => ({
  faceId: window.faceId,
  direction: window.direction,
  fromUtc: toIso(window.fromMs),
  toUtc: toIso(window.toMs),
  minScanLossDb: window.minScanLossDb,
  maxScanLossDb: window.maxScanLossDb,
  minMarginDb: window.minMarginDb,
});

export const presentPass = (
  { pass, prediction, satellite }: PassInForce,
  windows: readonly UsableWindow[],
): PassAnswer => ({
  id: pass.id,
  stationId: pass.station.id,
  satelliteId: satellite.id,
  satelliteName: satellite.name,
  missionId: satellite.mission.id,
  aosUtc: toIso(prediction.aosMs),
  tcaUtc: toIso(prediction.tcaMs),
  losUtc: toIso(prediction.losMs),
  startsBefore: prediction.startsBefore,
  endsAfter: prediction.endsAfter,
  maxElevationDeg: prediction.maxElevationDeg,
  aosAzimuthDeg: prediction.aosAzimuthDeg,
  tcaAzimuthDeg: prediction.tcaAzimuthDeg,
  losAzimuthDeg: prediction.losAzimuthDeg,
  tcaRangeKm: prediction.tcaRangeKm,
  elementSetId: prediction.elementSet.id,
  elementSetEpochUtc: toIso(prediction.elementSet.epochMs),
  vanished: pass.vanished,
  windows: windows.map(presentWindow),
});

/** The most points of one answer: three hours at one second. */
const MOST_POINTS = 10_800;

export const presentTrack = (
  { pass, prediction, satellite }: PassInForce,
  { faces, stepSeconds }: { faces: readonly FaceModel[]; stepSeconds: number },
): PassTrack => {
  const { track, aosMs, losMs } = prediction;
  const stepMs = Math.max(stepSeconds * SECOND_MS, (losMs - aosMs) / MOST_POINTS);
  const points: PassTrack['points'] = [];
  for (let atMs = aosMs; ; atMs = Math.min(atMs + stepMs, losMs)) {
    const direction = directionAt(track, atMs);
    const look = lookAnglesAt(track, atMs);
    points.push({
      atUtc: toIso(atMs),
      ...look,
      downlinkDopplerHz: dopplerHz(satellite.downlink.frequencyMhz, look.rangeRateKmS),
      apparentElevationDeg: look.elevationDeg + refractionDeg(look.elevationDeg),
      faces: faces.map((face) => {
        const { scanAngleRad } = directionOnFace(face, direction);
        return {
          faceId: face.id,
          scanAngleDeg: toDegrees(scanAngleRad),
          scanLossDb: scanLossDb(face, scanAngleRad),
          marginDb: null,
        };
      }),
    });
    if (atMs >= losMs) break;
  }
  return { passId: pass.id, track, points };
};
