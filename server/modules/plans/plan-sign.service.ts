import { mayEver } from '../../../shared/policy.ts';
import { inTransaction, reader, type Deps, type Person, type Work } from '../../deps.ts';
import { conflict, forbidden, unprocessable } from '../../errors.ts';
import { audit } from '../audit/audit.service.ts';
import type { DayPlan } from './plan.entity.ts';
import { mailScheduler } from './plan-mails.ts';
import { getPlan, lastRound, signOffsOf } from './plan-read.service.ts';
import { closeRound, moveTo, requireTag, reread, type LifeWish } from './plan-steps.ts';
import type { SignOffRow } from './sign-off.entity.ts';

export interface SignWish extends LifeWish {
  missionId: string;
  decision: 'approve' | 'return';
  comment: string;
}

/** One of the mission's leads answers for it; the person who submitted never does. */
export const signPlan = async (deps: Deps, wish: SignWish): Promise<DayPlan> => {
  const { person, planId, missionId } = wish;
  const seen = await getPlan(reader(deps), planId);
  const subject = { missionId, submittedById: seen.submittedById ?? null };
  if (!mayEver(person, 'plan.sign', subject))
    throw forbidden('Only a lead of the mission signs for it, and not who submitted the plan.');
  requireTag(seen, wish.ifMatch);
  if (wish.decision === 'return' && wish.comment.length < 3)
    throw unprocessable('reason-needed', 'A return needs a reason.', [
      { pointer: '/comment', detail: 'Say what has to change' },
    ]);
  return inTransaction(deps, async (work) => {
    const plan = await reread(work, wish);
    if (plan.state !== 'in-review')
      throw conflict('wrong-state', `A plan that is ${plan.state} is not up for sign-off.`);
    const round = await lastRound(work.em, plan.id);
    const rows = round ? await signOffsOf(work.em, round) : [];
    const row = rows.find((one) => one.mission.id === missionId);
    if (!row) throw conflict('not-asked', 'The mission has nothing to sign in this plan.');
    if (row.state !== 'pending') throw conflict('signed', 'The mission has answered already.');
    row.state = wish.decision === 'approve' ? 'approved' : 'returned';
    row.by = work.em.getReference('User', person.id) as never;
    row.byName = person.name;
    row.atMs = work.nowMs;
    row.comment = wish.comment;
    await answered(work, { plan, rows, row, person });
    return plan;
  });
};

const answered = async (
  work: Work,
  {
    plan,
    rows,
    row,
    person,
  }: { plan: DayPlan; rows: SignOffRow[]; row: SignOffRow; person: Person },
): Promise<void> => {
  const isReturn = row.state === 'returned';
  const isLast = rows.every((one) => one.state === 'approved' || one.state === 'unchanged');
  if (isReturn) await closeRound(work, plan, 'returned');
  moveTo(work, plan, isReturn ? 'draft' : isLast ? 'approved' : 'in-review');
  await work.em.flush();
  await audit(work, person, {
    action: isReturn ? 'plan.return' : 'plan.sign',
    entity: 'plan',
    entityId: plan.id,
    missionId: row.mission.id,
    summary: `${row.mission.name}: plan of ${plan.day} ${isReturn ? `returned: ${row.comment ?? ''}` : 'approved'}`,
    details: { digest: row.digest, comment: row.comment },
  });
  if (!isReturn && !isLast) return;
  await mailScheduler(work, plan, {
    event: `answer ${plan.id} ${plan.contentVersion}`,
    subject: isReturn
      ? `${row.mission.name} returned the plan of ${plan.day}`
      : `The plan of ${plan.day} is approved`,
    lines: isReturn
      ? [`${person.name} returned it: ${row.comment ?? ''}`]
      : ['Every mission has signed. Release it when you are ready.'],
  });
};
