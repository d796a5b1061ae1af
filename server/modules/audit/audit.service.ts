import { randomUUID } from 'node:crypto';
import type { EntityManager } from '@mikro-orm/sqlite';
import { mayEver } from '../../../shared/policy.ts';
import type { Person, Work } from '../../deps.ts';
import { listPage, type PageWish } from '../../paging.ts';
import { AuditRow } from './audit-event.entity.ts';

export interface AuditEntry {
  action: string;
  entity: string;
  entityId: string;
  missionId?: string | null;
  summary: string;
  details?: Record<string, unknown>;
}

/** Writes who did what into the transaction of the change itself. `null`: the system acted by itself. */
export const audit = async (
  { em, nowMs }: Work,
  person: Pick<Person, 'id' | 'name'> | null,
  entry: AuditEntry,
): Promise<void> => {
  await em.execute(
    `insert into audit_events (id, sequence, at_ms, actor_id, actor_name, action, entity, entity_id, mission_id, summary, details)
     values (?, (select coalesce(max(sequence), 0) + 1 from audit_events), ?, ?, ?, ?, ?, ?, ?, ?, ?)`,
    [
      randomUUID(),
      nowMs,
      person?.id ?? null,
      person?.name ?? 'Skysheaf',
      entry.action,
      entry.entity,
      entry.entityId,
      entry.missionId ?? null,
      entry.summary,
      JSON.stringify(entry.details ?? {}),
    ],
  );
};

export interface AuditFilter extends PageWish {
  entity?: string | undefined;
  entityId?: string | undefined;
  action?: string | undefined;
}

/** Newest first. A lead reads the events of own missions and own acts only. */
export const listAuditEvents = (em: EntityManager, person: Person, filter: AuditFilter) => {
  const mine = mayEver(person, 'see.everything')
    ? {}
    : { $or: [{ missionId: { $in: [...person.leadsMissionIds] } }, { actorId: person.id }] };
  const { entity, entityId, action } = filter;
  const asked = {
    ...(entity && { entity }),
    ...(entityId && { entityId }),
    ...(action && { action }),
  };
  return listPage<AuditRow>(em, AuditRow, filter, {
    sort: 'sequence',
    descending: true,
    where: { $and: [asked, mine] },
  });
};
