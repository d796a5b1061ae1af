import { missionName, type PlanContext } from '../../shared/schedule/context.ts';
import type { ContactModel, LegModel } from '../../shared/schedule/model.ts';
import {
  judgeRequirements,
  type RequirementResult,
} from '../../shared/schedule/score/requirements.ts';
import { MINUTE_MS } from '../../shared/time.ts';
import type { PlanChanges, SolvedContact } from './planned.ts';

const sameTimes = (a: LegModel | null, b: LegModel | null): boolean =>
  a?.fromMs === b?.fromMs && a?.toMs === b?.toMs;
const minutesOf = (contacts: readonly { receive: LegModel }[]): number =>
  contacts.reduce((sum, { receive }) => sum + receive.toMs - receive.fromMs, 0) / MINUTE_MS;

type Fate = 'kept' | 'channelOnly' | 'changed';

/** What became of a contact. */
export function fateOf(before: ContactModel, after: SolvedContact): Fate {
  const times =
    sameTimes(before.receive, after.receive) && sameTimes(before.transmit, after.transmit);
  if (!times || before.faceId !== after.faceId) return 'changed';
  const channels =
    before.receive.channelId === after.receive.channelId &&
    before.transmit?.channelId === after.transmit?.channelId;
  return channels ? 'kept' : 'channelOnly';
}

const keyOf = ({ requirementId, satelliteId }: RequirementResult): string =>
  `${requirementId}|${satelliteId ?? ''}`;

/** Contacts that have no identity yet, named for judging only. */
export const named = (contacts: readonly SolvedContact[]): ContactModel[] =>
  contacts.map((contact, index) => ({ ...contact, id: contact.id ?? `new ${index}` }));

const counted = (count: number, what: string): string =>
  `${count} ${what}${count === 1 ? '' : 's'}`;

function changeWords(context: PlanContext, changes: Omit<PlanChanges, 'words'>): string {
  const { added, removed, changed, channelOnly, kept, missionIds } = changes;
  if (added + removed + changed + channelOnly === 0)
    return `Nothing changes; ${counted(kept, 'contact')} stay.`;
  const parts = [
    [added, 'added'],
    [removed, 'removed'],
    [changed, 'changed'],
    [channelOnly, 'moved to another channel'],
    [kept, 'kept'],
  ] as const;
  const contacts = parts.filter(([count]) => count > 0).map(([count, what]) => `${count} ${what}`);
  const missions = missionIds.map((id) => missionName(context, id));
  const minutes = Math.round(changes.minutesAfter - changes.minutesBefore);
  const whom = missions.length > 0 ? ` Missions touched: ${missions.join(', ')}.` : '';
  return `Contacts: ${contacts.join(', ')}; ${minutes >= 0 ? '+' : ''}${minutes} min.${whom}`;
}

/** What a solved plan changes against the plan as it stood, in numbers and in a sentence. */
export function changesOf(
  context: PlanContext,
  before: readonly ContactModel[],
  after: readonly SolvedContact[],
): PlanChanges {
  const byId = new Map(before.map((contact) => [contact.id, contact]));
  const count = { kept: 0, channelOnly: 0, changed: 0, added: 0 };
  const missions = new Set<string>();
  for (const contact of after) {
    const old = contact.id === null ? undefined : byId.get(contact.id);
    const fate = old ? fateOf(old, contact) : 'added';
    count[fate]++;
    if (fate === 'added' || fate === 'changed') missions.add(contact.missionId);
  }
  const afterIds = new Set(after.map(({ id }) => id));
  const removed = before.filter(({ id }) => !afterIds.has(id));
  for (const { missionId } of removed) missions.add(missionId);
  const metBefore = new Map(
    judgeRequirements(context.day, before).map((result) => [keyOf(result), result.met]),
  );
  const results = judgeRequirements(context.day, named(after));
  const changes = {
    ...count,
    removed: removed.length,
    missionIds: [...missions],
    minutesBefore: minutesOf(before),
    minutesAfter: minutesOf(after),
    newlyMet: results.filter((one) => one.met && metBefore.get(keyOf(one)) === false).map(keyOf),
    newlyMissed: results.filter((one) => !one.met && metBefore.get(keyOf(one)) === true).map(keyOf),
  };
  return { ...changes, words: changeWords(context, changes) };
}
