import type { EntityManager } from '@mikro-orm/sqlite';
import { judgeContacts } from '../../../shared/schedule/rules/judge-plan.ts';
import type { Violation } from '../../../shared/schedule/model.ts';
import { mayEver } from '../../../shared/policy.ts';
import type { Edit } from '../../../shared/schemas/edit.ts';
import { contains, dayInterval, MINUTE_MS, SECOND_MS, toIso } from '../../../shared/time.ts';
import { inTransaction, reader, type Deps, type Person } from '../../deps.ts';
import { conflict, forbidden, ruleBroken, unprocessable } from '../../errors.ts';
import { audit } from '../audit/audit.service.ts';
import { applyEdits, type Edited, type FormerContacts } from './apply-edits.ts';
import { Contact } from './contact.entity.ts';
import { standingContacts, storeContacts, type WishedContact } from './contact-store.ts';
import { DayPlan } from './plan.entity.ts';
import { presentViolation } from './plan.presenter.ts';
import { getPlan } from './plan-read.service.ts';
import { requireAction, requireTag } from './plan-steps.ts';
import type { World, Worlds } from './world.ts';

/** Contacts that have begun, or begin within the freeze time, are left to operational revisions. */
const refuseFrozen = (
  { world, nowMs }: { world: World; nowMs: number },
  before: readonly WishedContact[],
  edited: Edited,
): void => {
  const fromMs = nowMs + world.day.station.freezeTimeSeconds * SECOND_MS;
  const touched = [...before, ...edited.contacts].filter((one) => edited.touched.has(one.id));
  const frozen = touched.find((contact) => contact.receive.fromMs < fromMs);
  if (!frozen) return;
  const minutes = Math.round((world.day.station.freezeTimeSeconds * SECOND_MS) / MINUTE_MS);
  throw conflict(
    'frozen',
    `The contact at ${toIso(frozen.receive.fromMs).slice(11, 19)} has begun or begins within ${minutes} min. Use an operational revision of the released plan.`,
  );
};

const refuseOtherDay = (plan: DayPlan, edited: Edited): void => {
  const day = dayInterval(plan.day);
  const stray = edited.contacts.find(
    ({ id, receive: { fromMs } }) =>
      edited.touched.has(id) && !contains(day, { fromMs, toMs: fromMs + 1 }),
  );
  if (stray)
    throw unprocessable(
      'other-day',
      `A contact belongs to the UTC day in which it begins; ${toIso(stray.receive.fromMs)} is not in ${plan.day}.`,
    );
};

const formerContacts = async (em: EntityManager, edits: Edit[]): Promise<FormerContacts> => {
  const ids = edits.flatMap((edit) => (edit.op === 'restore' ? [edit.contactId] : []));
  const contacts = await em.find(Contact, { id: { $in: ids } });
  return new Map(
    contacts.map((one) => [one.id, { passId: one.pass.id, emergency: one.emergency }]),
  );
};

export interface EditWish {
  planId: string;
  edits: Edit[];
  ifMatch: string;
  dryRun: boolean;
}
export interface EditOutcome {
  plan: DayPlan;
  edited: Edited;
  removedIds: string[];
  violations: Violation[];
}

/** Judges edits together on their result; writes all or none. A dry run answers the violations instead of refusing. */
export const editPlan = async (
  deps: Deps,
  worlds: Worlds,
  { person, wish }: { person: Person; wish: EditWish },
): Promise<EditOutcome> => {
  const seen = await getPlan(reader(deps), wish.planId);
  if (!mayEver(person, 'plan.edit')) throw forbidden('Your role does not allow this.');
  if (!wish.dryRun) requireTag(seen, wish.ifMatch);
  const world = await worlds.of(seen);
  return inTransaction(deps, async (work) => {
    const plan = await getPlan(work.em, wish.planId);
    if (!wish.dryRun) requireTag(plan, wish.ifMatch);
    requireAction(person, 'plan.edit', plan);
    const before = await standingContacts(work.em, plan.id);
    const edited = applyEdits(world, {
      contacts: before,
      former: await formerContacts(work.em, wish.edits),
      edits: wish.edits,
    });
    const removedIds = before
      .filter((one) => !edited.contacts.some(({ id }) => id === one.id))
      .map(({ id }) => id);
    // What was broken before and is not touched is shown on the plan, but does not stop an edit elsewhere.
    const violations = judgeContacts(world.context, edited.contacts).filter((violation) =>
      violation.contactIds.some((id) => edited.touched.has(id)),
    );
    if (wish.dryRun) return { plan, edited, removedIds, violations };
    if (violations.length > 0) throw ruleBroken(violations.map(presentViolation));
    refuseFrozen({ world, nowMs: work.nowMs }, before, edited);
    refuseOtherDay(plan, edited);
    await storeContacts(work, plan, { world, wished: edited.contacts });
    await audit(work, person, {
      action: 'plan.edit',
      entity: 'plan',
      entityId: plan.id,
      summary: `Plan of ${plan.day}: ${wish.edits.map((edit) => edit.op).join(', ')}`,
      details: { edits: wish.edits, inverse: edited.inverse },
    });
    return { plan, edited, removedIds, violations: [] };
  });
};
