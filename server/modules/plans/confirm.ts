import { judgeContacts } from '../../../shared/schedule/rules/judge-plan.ts';
import type { ContactModel, Violation } from '../../../shared/schedule/model.ts';
import type { Deps } from '../../deps.ts';
import { conflict, ruleBroken } from '../../errors.ts';
import { presentViolation } from './plan.presenter.ts';
import type { World } from './world.ts';

/**
 * Judges a whole plan twice: by the rules on the facts, and by the independent check that samples the tracks.
 * Refuses what breaks a rule; fails with the contradiction where the two do not agree (DESIGN 3c).
 */
export const confirmPlan = async (
  deps: Deps,
  world: World,
  contacts: ContactModel[],
  /** Contacts that are not in question now: what they break among themselves is no reason to refuse. */
  settledIds: ReadonlySet<string> = new Set(),
): Promise<void> => {
  const inQuestion = (violation: Violation) =>
    violation.contactIds.some((id) => !settledIds.has(id));
  const broken = judgeContacts(world.context, contacts).filter(inQuestion);
  if (broken.length > 0) throw ruleBroken(broken.map(presentViolation));
  const found = await deps.pool.run('verify', { day: world.day, contacts });
  const doubted = found.filter(inQuestion);
  if (doubted.length > 0)
    throw conflict(
      'contradiction',
      `The rules find nothing, but the independent check does: ${doubted[0]?.message ?? ''}`,
      { violations: doubted.map(presentViolation) },
    );
};
