import { z } from 'zod';
import { Id, Instant, Name, Polarisation, Version, page } from './common.ts';

const link = {
  frequencyMhz: z.number().min(100).max(60_000),
  bandwidthKhz: z.number().min(0.1).max(2_000_000),
  polarisation: Polarisation,
  rateKbps: z.number().min(0.01).max(10_000_000),
  requiredEbN0Db: z.number().min(-5).max(40),
};
export const Downlink = z.strictObject({ ...link, eirpDbw: z.number().min(-60).max(60) });
export const Uplink = z.strictObject({ ...link, gOverTDbK: z.number().min(-80).max(40) });

/** Nine digits: provisional numbers are that long. null: none yet. */
export const CatalogNumber = z.number().int().min(1).max(999_999_999);

const fields = {
  name: Name,
  catalogNumber: CatalogNumber.nullable(),
  missionId: Id,
  downlink: Downlink,
  uplink: Uplink.nullable(),
};
const extras = {
  transmitsAlways: z.boolean(),
  requiredCOverIDb: z.number().min(0).max(60).nullable(),
  guardTimeSeconds: z.number().int().min(0).max(600).nullable(),
  timeUncertaintySeconds: z.number().int().min(0).max(600),
};

export const Satellite = z.strictObject({
  id: Id,
  version: Version,
  ...fields,
  ...extras,
  retired: z.boolean(),
  /** The element set in use, null while there is none. */
  elementSetId: Id.nullable(),
  elementSetEpochUtc: Instant.nullable(),
});
export type Satellite = z.infer<typeof Satellite>;
export const SatellitePage = page(Satellite);

export const CreateSatellite = z.strictObject({
  ...fields,
  transmitsAlways: extras.transmitsAlways.default(false),
  requiredCOverIDb: extras.requiredCOverIDb.default(null),
  guardTimeSeconds: extras.guardTimeSeconds.default(null),
  timeUncertaintySeconds: extras.timeUncertaintySeconds.default(0),
});
export type CreateSatellite = z.infer<typeof CreateSatellite>;
export const PatchSatellite = z
  .strictObject({ ...fields, ...extras, retired: z.boolean() })
  .partial();
export type PatchSatellite = z.infer<typeof PatchSatellite>;
