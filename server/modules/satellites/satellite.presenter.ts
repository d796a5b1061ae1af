import type { Satellite as SatelliteAnswer } from '../../../shared/schemas/satellite.ts';
import { toIso } from '../../../shared/time.ts';
import type { Satellite } from './satellite.entity.ts';

/** The element set in use, as far as the list shows it. */
export interface InUse {
  id: string;
  epochMs: number;
}

export const presentSatellite = (satellite: Satellite, inUse: InUse | null): SatelliteAnswer => ({
  id: satellite.id,
  version: satellite.version,
  name: satellite.name,
  catalogNumber: satellite.catalogNumber ?? null,
  missionId: satellite.mission.id,
  downlink: satellite.downlink,
  uplink: satellite.uplink ?? null,
  transmitsAlways: satellite.transmitsAlways,
  requiredCOverIDb: satellite.requiredCOverIDb ?? null,
  guardTimeSeconds: satellite.guardTimeSeconds ?? null,
  timeUncertaintySeconds: satellite.timeUncertaintySeconds,
  retired: satellite.retired,
  elementSetId: inUse?.id ?? null,
  elementSetEpochUtc: inUse ? toIso(inUse.epochMs) : null,
});
