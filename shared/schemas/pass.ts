import { z } from 'zod';
import { Direction, Id, Instant, page } from './common.ts';

export const UsableWindow = z.strictObject({
  faceId: Id,
  direction: Direction,
  fromUtc: Instant,
  toUtc: Instant,
  minScanLossDb: z.number(),
  maxScanLossDb: z.number(),
  minMarginDb: z.number().nullable(),
});
export const Pass = z.strictObject({
  id: Id,
  stationId: Id,
  satelliteId: Id,
  satelliteName: z.string(),
  missionId: Id,
  aosUtc: Instant,
  tcaUtc: Instant,
  losUtc: Instant,
  /** The pass was under way at 00:00 UTC, where continuous visibility is cut (or the run began or ended). */
  startsBefore: z.boolean(),
  endsAfter: z.boolean(),
  maxElevationDeg: z.number(),
  aosAzimuthDeg: z.number(),
  tcaAzimuthDeg: z.number(),
  losAzimuthDeg: z.number(),
  tcaRangeKm: z.number(),
  elementSetId: Id,
  elementSetEpochUtc: Instant,
  vanished: z.boolean(),
  windows: z.array(UsableWindow),
});
export type Pass = z.infer<typeof Pass>;
export const PassPage = page(Pass);
export const PassQuery = z.strictObject({
  stationId: Id.optional(),
  fromUtc: Instant.optional(),
  toUtc: Instant.optional(),
  satelliteId: Id.optional(),
  missionId: Id.optional(),
  minElevationDeg: z.coerce.number().min(0).max(90).optional(),
  limit: z.coerce.number().int().min(1).max(500).default(100),
  cursor: z.string().max(200).optional(),
});

export const TrackPoint = z.strictObject({
  atUtc: Instant,
  azimuthDeg: z.number(),
  elevationDeg: z.number(),
  rangeKm: z.number(),
  rangeRateKmS: z.number(),
  /** Shift of the downlink as it arrives. */
  downlinkDopplerHz: z.number(),
  /** Elevation with the refraction of standard air, for display only. */
  apparentElevationDeg: z.number(),
  faces: z.array(
    z.strictObject({
      faceId: Id,
      scanAngleDeg: z.number(),
      /** null beyond the hard end. */
      scanLossDb: z.number().nullable(),
      marginDb: z.number().nullable(),
    }),
  ),
});
export const PassTrack = z.strictObject({
  passId: Id,
  /** Knots for the client's own evaluation (shared/orbit/track). */
  track: z.strictObject({ startMs: z.number(), stepMs: z.number(), knots: z.array(z.number()) }),
  points: z.array(TrackPoint),
});
export type PassTrack = z.infer<typeof PassTrack>;
export const TrackQuery = z.strictObject({
  stepSeconds: z.coerce.number().int().min(1).max(600).default(30),
});

export const CreatePredictionRun = z
  .strictObject({ stationId: Id, fromUtc: Instant, toUtc: Instant })
  .refine((q) => Date.parse(q.fromUtc) < Date.parse(q.toUtc), {
    path: ['toUtc'],
    message: 'The end lies after the beginning',
  });
