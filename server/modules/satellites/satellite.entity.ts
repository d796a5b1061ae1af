import { defineEntity, p, type InferEntity } from '@mikro-orm/core';
import type { SatelliteModel } from '../../../shared/schedule/model.ts';
import { Mission } from '../missions/mission.entity.ts';

export const Satellite = defineEntity({
  name: 'Satellite',
  tableName: 'satellites',
  properties: {
    id: p.uuid().primary(),
    version: p.integer().version(),
    name: p.string().unique(),
    /** Up to nine digits; provisional or missing at first. */
    catalogNumber: p.integer().nullable().unique(),
    mission: () => p.manyToOne(Mission),
    downlink: p.json().$type<SatelliteModel['downlink']>(),
    uplink: p.json().$type<NonNullable<SatelliteModel['uplink']>>().nullable(),
    transmitsAlways: p.boolean().default(false),
    requiredCOverIDb: p.float().nullable(),
    guardTimeSeconds: p.integer().nullable(),
    timeUncertaintySeconds: p.integer().default(0),
    retired: p.boolean().default(false),
  },
});
export type Satellite = InferEntity<typeof Satellite>;
