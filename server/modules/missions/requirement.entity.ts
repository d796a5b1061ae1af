import { defineEntity, p, type InferEntity } from '@mikro-orm/core';
import type { RequestModel, RequirementModel, UplinkNeed } from '../../../shared/schedule/model.ts';
import { Mission } from './mission.entity.ts';

/** A standing requirement line of a mission. */
export const RequirementRow = defineEntity({
  name: 'RequirementRow',
  tableName: 'requirements',
  properties: {
    id: p.uuid().primary(),
    version: p.integer().version(),
    mission: () => p.manyToOne(Mission).deleteRule('cascade'),
    appliesTo: p.string().$type<RequirementModel['appliesTo']>(),
    /** null: at all stations. */
    stationId: p.uuid().nullable(),
    what: p.string().$type<RequirementModel['what']>(),
    least: p.float().nullable(),
    most: p.float().nullable(),
    minimumDurationSeconds: p.integer(),
    uplink: p.string().$type<UplinkNeed>(),
    leastUplinkMinutes: p.float().nullable(),
    minimumElevationDeg: p.float().nullable(),
    marginFloorDb: p.float().nullable(),
    hoursUtc: p.json().$type<[number, number]>().nullable(),
    weekdays: p.json().$type<number[]>().nullable(),
    scanLossLimitDb: p.float().nullable(),
  },
});
export type RequirementRow = InferEntity<typeof RequirementRow>;

/** A one-off request; satellite and pass stand to the right in the line of modules, so their ids are plain. */
export const RequestRow = defineEntity({
  name: 'RequestRow',
  tableName: 'requests',
  properties: {
    id: p.uuid().primary(),
    version: p.integer().version(),
    mission: () => p.manyToOne(Mission).deleteRule('cascade'),
    satelliteId: p.uuid(),
    kind: p.string().$type<RequestModel['kind']>(),
    passId: p.uuid().nullable(),
    minutes: p.float().nullable(),
    uplink: p.string().$type<UplinkNeed>(),
    fromMs: p.integer(),
    toMs: p.integer(),
    priority: p.integer(),
    reason: p.text(),
    state: p.string().$type<'open' | 'withdrawn'>().default('open'),
  },
});
export type RequestRow = InferEntity<typeof RequestRow>;
