import { defineEntity, p, type InferEntity } from '@mikro-orm/core';
import type { KeepOutSector, MaskKnot } from '../../../shared/schedule/model.ts';

export const Station = defineEntity({
  name: 'Station',
  tableName: 'stations',
  properties: {
    id: p.uuid().primary(),
    version: p.integer().version(),
    name: p.string().unique(),
    latitudeDeg: p.float(),
    longitudeDeg: p.float(),
    heightM: p.float(),
    timeZone: p.string(),
    horizonMask: p.json().$type<MaskKnot[]>(),
    receiveElevationFloorDeg: p.float(),
    transmitElevationFloorDeg: p.float(),
    keepOutSectors: p.json().$type<KeepOutSector[]>(),
    guardTimeSeconds: p.integer(),
    freezeTimeSeconds: p.integer(),
    signOffCutOffMinutes: p.integer(),
    ut1MinusUtcSeconds: p.float().default(0),
  },
});
export type Station = InferEntity<typeof Station>;
