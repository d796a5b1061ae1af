import { defineEntity, p, type InferEntity } from '@mikro-orm/core';
import type { FaceModel, FaceRadio, Taper } from '../../../shared/schedule/model.ts';
import { Station } from './station.entity.ts';

export const Face = defineEntity({
  name: 'Face',
  tableName: 'faces',
  properties: {
    id: p.uuid().primary(),
    version: p.integer().version(),
    station: () => p.manyToOne(Station),
    label: p.string(),
    boresightAzimuthDeg: p.float(),
    boresightElevationDeg: p.float(),
    rollDeg: p.float(),
    elementsX: p.integer(),
    elementsY: p.integer(),
    pitchXMm: p.float(),
    pitchYMm: p.float(),
    receiveTaper: p.json().$type<Taper>(),
    transmitTaper: p.json().$type<Taper>(),
    scanLossExponent: p.float(),
    scanLossTable: p.json().$type<[number, number][]>().nullable(),
    normalLimitDb: p.float(),
    hardEndDb: p.float(),
    architecture: p.string().$type<FaceModel['architecture']>(),
    receiveBandMhz: p.json().$type<[number, number]>(),
    transmitBandMhz: p.json().$type<[number, number]>().nullable(),
    transmitBeamLimit: p.integer(),
    requiredIsolationDb: p.float(),
    sidelobeFloorDb: p.float(),
    radio: p.json().$type<FaceRadio>(),
  },
});
export type Face = InferEntity<typeof Face>;
