import { defineEntity, p, type InferEntity } from '@mikro-orm/core';
import type { ChannelModel, Direction } from '../../../shared/schedule/model.ts';
import { Face } from './face.entity.ts';

export const Channel = defineEntity({
  name: 'Channel',
  tableName: 'channels',
  uniques: [{ properties: ['face', 'label'] }],
  properties: {
    id: p.uuid().primary(),
    version: p.integer().version(),
    face: () => p.manyToOne(Face),
    label: p.string(),
    direction: p.string().$type<Direction>(),
    polarisation: p.string().$type<ChannelModel['polarisation']>(),
    bandwidthKhz: p.float(),
    setUpSeconds: p.integer(),
    tearDownSeconds: p.integer(),
    inService: p.boolean().default(true),
  },
});
export type Channel = InferEntity<typeof Channel>;
