import { judgeContacts } from '../../../shared/schedule/rules/judge-plan.ts';
import { inTransaction, reader, type Deps } from '../../deps.ts';
import { standingContacts, tellPlan } from './contact-store.ts';
import { DayPlan } from './plan.entity.ts';
import { mailScheduler } from './plan-mails.ts';
import { getPlan } from './plan-read.service.ts';
import type { Worlds } from './world.ts';

/**
 * A change elsewhere (mask, radio data, closure, elements) that breaks a rule of an unreleased plan marks it and
 * mails its scheduler; the plan itself is never edited.
 */
export const markBrokenPlans = async (
  deps: Deps,
  worlds: Worlds,
  fromDay: string,
): Promise<void> => {
  const open = await reader(deps).find(DayPlan, {
    day: { $gte: fromDay },
    state: { $in: ['draft', 'in-review', 'approved'] },
  });
  for (const seen of open) {
    const world = await worlds.of(seen);
    const contacts = await standingContacts(reader(deps), seen.id);
    const broken = judgeContacts(world.context, contacts);
    const sentence = broken[0]?.message ?? null;
    if ((seen.needsAttention ?? null) === sentence) continue;
    await inTransaction(deps, async (work) => {
      const plan = await getPlan(work.em, seen.id);
      if (plan.contentVersion !== seen.contentVersion) return;
      plan.needsAttention = sentence;
      await work.em.flush();
      tellPlan(work, plan);
      if (sentence)
        await mailScheduler(work, plan, {
          event: `attention ${plan.id} ${plan.contentVersion} ${sentence}`,
          subject: `The plan of ${plan.day} needs attention`,
          lines: [sentence, broken.length > 1 ? `${broken.length - 1} more.` : ''],
        });
    });
  }
};
