import { defineEntity, p, type InferEntity } from '@mikro-orm/core';
import type { Track } from '../../../shared/orbit/track.ts';
import { ElementSet } from '../element-sets/element-set.entity.ts';
import { Satellite } from '../satellites/satellite.entity.ts';
import { Station } from '../stations/station.entity.ts';

/** The identity of a pass: a station and a satellite. Its geometry stands in its predictions. */
export const Pass = defineEntity({
  name: 'Pass',
  tableName: 'passes',
  indexes: [{ properties: ['station', 'aosMs'] }, { properties: ['satellite', 'aosMs'] }],
  properties: {
    id: p.uuid().primary(),
    station: () => p.manyToOne(Station),
    satellite: () => p.manyToOne(Satellite),
    /** The prediction in force; no reference, because predictions refer to their pass. */
    predictionId: p.uuid(),
    /** Copied from that prediction for the list: rounded to the millisecond. */
    aosMs: p.integer(),
    losMs: p.integer().index(),
    maxElevationDeg: p.float(),
    vanished: p.boolean().default(false),
  },
});
export type Pass = InferEntity<typeof Pass>;

/** Immutable: what one element set says of a pass under one version of station and mask. */
export const Prediction = defineEntity({
  name: 'Prediction',
  tableName: 'predictions',
  properties: {
    id: p.uuid().primary(),
    pass: () => p.manyToOne(Pass).index(),
    elementSet: () => p.manyToOne(ElementSet).index(),
    stationVersion: p.integer(),
    /** Exact crossings, ms UTC with fractions. */
    aosMs: p.float(),
    tcaMs: p.float(),
    losMs: p.float(),
    startsBefore: p.boolean(),
    endsAfter: p.boolean(),
    maxElevationDeg: p.float(),
    aosAzimuthDeg: p.float(),
    tcaAzimuthDeg: p.float(),
    losAzimuthDeg: p.float(),
    tcaRangeKm: p.float(),
    track: p.json().$type<Track>().lazy(true, false),
    createdMs: p.integer(),
  },
});
export type Prediction = InferEntity<typeof Prediction>;
