import { toIso } from '../../../shared/time.ts';
import {
  AuditEventPage,
  AuditQuery,
  type AuditEvent,
} from '../../../shared/schemas/audit-event.ts';
import { reader, type Deps } from '../../deps.ts';
import { route } from '../../middleware/route.ts';
import type { AuditRow } from './audit-event.entity.ts';
import { listAuditEvents } from './audit.service.ts';

const present = (row: AuditRow): AuditEvent => ({
  id: row.id,
  atUtc: toIso(row.atMs),
  actorName: row.actorName,
  action: row.action,
  entity: row.entity,
  entityId: row.entityId,
  missionId: row.missionId ?? null,
  summary: row.summary,
  details: row.details,
});

export const auditRoutes = (deps: Deps) => [
  route({
    method: 'get',
    path: '/audit-events',
    summary: 'Who did what, newest first',
    access: 'session',
    action: 'see.audit',
    query: AuditQuery,
    answer: AuditEventPage,
    handler: async ({ query, person }) => {
      const found = await listAuditEvents(reader(deps), person, query);
      return { body: { items: found.items.map(present), nextCursor: found.nextCursor } };
    },
  }),
];
