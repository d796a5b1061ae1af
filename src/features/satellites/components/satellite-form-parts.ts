import { z } from 'zod';
import { CreateSatellite, type Satellite } from '../../../../shared/schemas/satellite.ts';

/** What is sent, and `retired`, which only a change may say. */
export const SatelliteFormSchema = CreateSatellite.extend({ retired: z.boolean() });
export type SatelliteValues = z.input<typeof SatelliteFormSchema>;
export type SatelliteBody = z.output<typeof SatelliteFormSchema>;

export const newLink = {
  frequencyMhz: null,
  bandwidthKhz: null,
  polarisation: 'rhcp' as const,
  rateKbps: null,
  requiredEbN0Db: null,
};

/** What the fields hold at first; empty number fields hold null. */
export const valuesOf = (satellite: Satellite | null): unknown => {
  if (!satellite)
    return {
      name: '',
      catalogNumber: null,
      missionId: '',
      downlink: { ...newLink, eirpDbw: null },
      uplink: null,
      transmitsAlways: false,
      requiredCOverIDb: null,
      guardTimeSeconds: null,
      timeUncertaintySeconds: 0,
      retired: false,
    };
  const { id, version, elementSetId, elementSetEpochUtc, ...values } = satellite;
  void [id, version, elementSetId, elementSetEpochUtc];
  return values;
};

export const FIELDSET = 'rounded-panel border border-line bg-surface px-4 pt-3 pb-4';
export const GRID = 'grid gap-x-4 gap-y-3 narrow:grid-cols-3';
