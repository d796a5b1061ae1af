import { randomUUID } from 'node:crypto';
import type { EntityManager } from '@mikro-orm/sqlite';
import type { ContactLog, PutContactLog } from '../../../shared/schemas/contact-log.ts';
import { toIso } from '../../../shared/time.ts';
import { inTransaction, type Deps, type Person } from '../../deps.ts';
import { notFound } from '../../errors.ts';
import { visibleTo } from '../../visible-to.ts';
import { audit } from '../audit/audit.service.ts';
import { Contact, ContactLogRow, PlannedContact } from './contact.entity.ts';

const present = (row: ContactLogRow): ContactLog => ({
  contactId: row.contact.id,
  outcome: row.outcome,
  cause: row.cause,
  minutes: row.minutes ?? null,
  volumeMbit: row.volumeMbit ?? null,
  note: row.note,
  byName: row.byName,
  atUtc: toIso(row.atMs),
});

/** How a contact went; written again, the new entry stands and the audit trail keeps both. */
export const putContactLog = (
  deps: Deps,
  person: Person,
  { contactId, log }: { contactId: string; log: PutContactLog },
): Promise<ContactLog> =>
  inTransaction(deps, async (work) => {
    const contact = await work.em.findOne(Contact, contactId, { populate: ['satellite'] });
    if (!contact) throw notFound('The contact');
    const fields = { ...log, byName: person.name, atMs: work.nowMs };
    const row = await work.em.findOne(ContactLogRow, { contact: contactId });
    const kept =
      row ?? work.em.create(ContactLogRow, { id: randomUUID(), contact: contactId, ...fields });
    work.em.assign(kept, fields);
    await work.em.flush();
    await audit(work, person, {
      action: 'contact.log',
      entity: 'contact',
      entityId: contactId,
      missionId: contact.satellite.mission.id,
      summary: `${contact.satellite.name}: ${log.outcome}`,
      details: { ...log },
    });
    return present(kept);
  });

export const getContactLog = async (
  em: EntityManager,
  person: Person,
  contactId: string,
): Promise<ContactLog> => {
  const contact = await em.findOne(Contact, contactId, { populate: ['satellite'] });
  const row = await em.findOne(ContactLogRow, { contact: contactId });
  if (!contact || !row || !visibleTo(person).mission(contact.satellite.mission.id))
    throw notFound('The log');
  return present(row);
};

/** The logs of a plan's contacts. */
export const logsOfPlan = async (
  em: EntityManager,
  person: Person,
  planId: string,
): Promise<ContactLog[]> => {
  const rows = await em.find(
    PlannedContact,
    { plan: planId },
    { populate: ['contact', 'contact.satellite'] },
  );
  const visible = visibleTo(person);
  const ids = rows
    .filter((row) => visible.mission(row.contact.satellite.mission.id))
    .map((row) => row.contact.id);
  return (await em.find(ContactLogRow, { contact: { $in: ids } })).map(present);
};
