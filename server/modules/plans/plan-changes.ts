import type { EntityManager } from '@mikro-orm/sqlite';
import type { PlanChanges } from '../../../shared/schemas/plan.ts';
import type { Person } from '../../deps.ts';
import { notFound } from '../../errors.ts';
import type { PlannedContact } from './contact.entity.ts';
import { toContactModel } from './contact-model.ts';
import { contactsOf } from './day-model.ts';
import { DayPlan } from './plan.entity.ts';
import { presentContact } from './plan.presenter.ts';
import type { PlanView } from './plan-read.service.ts';

const sameLegs = (a: PlannedContact, b: PlannedContact): boolean => {
  const [one, other] = [toContactModel(a), toContactModel(b)];
  return (
    JSON.stringify([one.receive, one.transmit]) === JSON.stringify([other.receive, other.transmit])
  );
};

/** What differs from another revision of the day; unsaid, from the one before. */
export const planChanges = async (
  em: EntityManager,
  { view, against, person }: { view: PlanView; against: number | undefined; person: Person },
): Promise<PlanChanges> => {
  const { plan, world, rows } = view;
  const revision = against ?? plan.revision - 1;
  const other = await em.findOne(DayPlan, {
    station: plan.station.id,
    day: plan.day,
    revision,
  });
  if (!other && (against !== undefined || plan.revision > 1)) throw notFound('That revision');
  const before = other ? await contactsOf(em, [other.id]) : [];
  const show = (row: PlannedContact) => presentContact(world, row, person);
  const match = (list: PlannedContact[], row: PlannedContact) =>
    list.find((one) => one.contact.id === row.contact.id);
  return {
    againstRevision: other ? revision : 0,
    added: rows.filter((row) => !match(before, row)).map(show),
    removed: before.filter((row) => !match(rows, row)).map(show),
    changed: rows.flatMap((row) => {
      const old = match(before, row);
      return old && !sameLegs(old, row) ? [{ before: show(old), after: show(row) }] : [];
    }),
  };
};
