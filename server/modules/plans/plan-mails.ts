import type { EntityManager } from '@mikro-orm/sqlite';
import type { Work } from '../../deps.ts';
import { enqueueMail } from '../mail/mail.service.ts';
import { MissionLead } from '../missions/mission.entity.ts';
import { User } from '../users/user.entity.ts';
import type { DayPlan } from './plan.entity.ts';

interface Letter {
  /** Names the event; with the person's id it keeps a mail from being written twice. */
  event: string;
  subject: string;
  lines: string[];
}

const send = async (work: Work, user: Pick<User, 'id' | 'email' | 'name'>, letter: Letter) =>
  enqueueMail(work, {
    dedupeKey: `${letter.event} ${user.id}`,
    to: user.email,
    subject: letter.subject,
    body: [`${user.name},`, '', ...letter.lines, '', 'Skysheaf'].join('\n'),
  });

/** To the leads of the missions concerned, each mission's letter only to its own leads. */
export const mailLeads = async (
  work: Work,
  missionIds: readonly string[],
  letter: (missionName: string) => Letter,
): Promise<void> => {
  const leads = await work.em.find(
    MissionLead,
    { mission: { $in: [...missionIds] } },
    { populate: ['user', 'mission'] },
  );
  for (const { user, mission } of leads)
    if (!user.disabled) {
      const one = letter(mission.name);
      await send(work, user, { ...one, event: `${one.event} ${mission.id}` });
    }
};

const withRole = async (em: EntityManager, role: User['roles'][number]): Promise<User[]> =>
  (await em.find(User, { disabled: false })).filter((user) => user.roles.includes(role));

/** To the crew on shift. */
export const mailOperators = async (work: Work, letter: Letter): Promise<void> => {
  for (const user of await withRole(work.em, 'operator')) await send(work, user, letter);
};

/** To the scheduler who has the plan in hand: who submitted it, else who began it, else every scheduler. */
export const mailScheduler = async (work: Work, plan: DayPlan, letter: Letter): Promise<void> => {
  const id = plan.submittedById ?? plan.createdById;
  const one = id ? await work.em.findOne(User, { id, disabled: false }) : null;
  for (const user of one ? [one] : await withRole(work.em, 'scheduler'))
    await send(work, user, letter);
};
