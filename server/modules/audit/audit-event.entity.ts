import { defineEntity, p, type InferEntity } from '@mikro-orm/core';

/** Who did what, when. Rows are only ever added; names are stored as they were. */
export const AuditRow = defineEntity({
  name: 'AuditRow',
  tableName: 'audit_events',
  properties: {
    id: p.uuid().primary(),
    /** Order of writing; the cursor of the list. */
    sequence: p.integer().unique(),
    atMs: p.integer().index(),
    actorId: p.uuid().nullable(),
    actorName: p.string(),
    action: p.string(),
    entity: p.string(),
    entityId: p.string().index(),
    missionId: p.uuid().nullable(),
    summary: p.text(),
    details: p.json().$type<Record<string, unknown>>(),
  },
});
export type AuditRow = InferEntity<typeof AuditRow>;
