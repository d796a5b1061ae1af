import { inTransaction, reader, type Deps } from '../../deps.ts';
import { unprocessable } from '../../errors.ts';
import { audit } from '../audit/audit.service.ts';
import { confirmPlan } from './confirm.ts';
import { standingContacts } from './contact-store.ts';
import type { DayPlan } from './plan.entity.ts';
import { mailLeads } from './plan-mails.ts';
import { beginStep, closeRound, moveTo, reread, type LifeWish } from './plan-steps.ts';
import { openRound, partsToSign, planSignOffs, requireSigners } from './sign-off-rounds.ts';
import type { Worlds } from './world.ts';

/** draft -> in-review (or approved at once when nobody has to sign). */
export const submitPlan = async (deps: Deps, worlds: Worlds, wish: LifeWish): Promise<DayPlan> => {
  const seen = await beginStep(deps, wish, 'plan.submit');
  const world = await worlds.of(seen);
  const contacts = await standingContacts(reader(deps), seen.id);
  await confirmPlan(deps, world, contacts);
  return inTransaction(deps, async (work) => {
    const plan = await reread(work, wish);
    const parts = partsToSign(world, contacts);
    const planned = await planSignOffs(work.em, { plan, world, parts });
    await requireSigners(work.em, planned, wish.person.id);
    await openRound(work, { person: wish.person, plan, world, planned });
    plan.submittedById = wish.person.id;
    plan.submittedByName = wish.person.name;
    plan.hasBeenReviewed = true;
    plan.needsAttention = null;
    const open = planned.filter((one) => !one.from && !one.consent);
    moveTo(work, plan, open.length > 0 ? 'in-review' : 'approved');
    await work.em.flush();
    await audit(work, wish.person, {
      action: 'plan.submit',
      entity: 'plan',
      entityId: plan.id,
      summary: `Plan of ${plan.day}, revision ${plan.revision}, submitted for sign-off`,
      details: { version: plan.contentVersion, missions: parts.size, toSign: open.length },
    });
    await mailLeads(
      work,
      open.map((one) => one.missionId),
      (missionName) => ({
        event: `submit ${plan.id} ${plan.contentVersion}`,
        subject: `${missionName}: the plan of ${plan.day} waits for your sign-off`,
        lines: [
          `${wish.person.name} submitted revision ${plan.revision} of the plan of ${plan.day}.`,
          'Sign it or return it with a reason.',
        ],
      }),
    );
    return plan;
  });
};

/** in-review or approved -> draft; an approved plan needs a reason. */
export const withdrawPlan = async (
  deps: Deps,
  wish: LifeWish & { reason: string },
): Promise<DayPlan> => {
  const seen = await beginStep(deps, wish, 'plan.withdraw');
  if (seen.state === 'approved' && wish.reason.length < 3)
    throw unprocessable('reason-needed', 'Say why an approved plan is withdrawn.', [
      { pointer: '/reason', detail: 'A reason is needed' },
    ]);
  return inTransaction(deps, async (work) => {
    const plan = await reread(work, wish);
    const before = plan.state;
    await closeRound(work, plan, 'withdrawn');
    moveTo(work, plan, 'draft');
    await work.em.flush();
    await audit(work, wish.person, {
      action: 'plan.withdraw',
      entity: 'plan',
      entityId: plan.id,
      summary: `Plan of ${plan.day} withdrawn from ${before}${wish.reason ? `: ${wish.reason}` : ''}`,
    });
    return plan;
  });
};
