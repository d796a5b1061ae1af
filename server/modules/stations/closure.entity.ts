import { defineEntity, p, type InferEntity } from '@mikro-orm/core';
import type { ClosureModel } from '../../../shared/schedule/model.ts';
import { Station } from './station.entity.ts';

export const Closure = defineEntity({
  name: 'Closure',
  tableName: 'closures',
  properties: {
    id: p.uuid().primary(),
    version: p.integer().version(),
    station: () => p.manyToOne(Station),
    scope: p.string().$type<ClosureModel['scope']>(),
    scopeId: p.uuid(),
    direction: p.string().$type<ClosureModel['direction']>(),
    fromMs: p.integer(),
    /** null: until further notice. */
    toMs: p.integer().nullable(),
    /** null: out of service. */
    reducedByDb: p.float().nullable(),
    reason: p.text(),
    inhibit: p.boolean().default(false),
    createdByName: p.string(),
    endedMs: p.integer().nullable(),
    endedByName: p.string().nullable(),
  },
});
export type Closure = InferEntity<typeof Closure>;
