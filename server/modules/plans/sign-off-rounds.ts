import { randomUUID } from 'node:crypto';
import type { EntityManager } from '@mikro-orm/sqlite';
import type { ContactModel } from '../../../shared/schedule/model.ts';
import { scorePlan } from '../../../shared/schedule/score/score-plan.ts';
import type { Person, Work } from '../../deps.ts';
import { conflict } from '../../errors.ts';
import { Mission, MissionLead } from '../missions/mission.entity.ts';
import { digestOf, missionPart, partStands, type MissionPart } from './mission-part.ts';
import type { DayPlan } from './plan.entity.ts';
import { eligibleLeads, lastRound, signOffsOf } from './plan-read.service.ts';
import { Round, SignOffRow } from './sign-off.entity.ts';
import type { World } from './world.ts';

/** Missions with contacts, unmet requirements or requests in the plan, each with its own part. */
export const partsToSign = (
  world: World,
  contacts: readonly ContactModel[],
): Map<string, MissionPart> => {
  const score = scorePlan(world.day, contacts);
  const parts = new Map<string, MissionPart>();
  for (const mission of world.day.missions) {
    const part = missionPart(mission.id, contacts, score.requirements);
    const hasUnmet = part.results.some((result) => !result.met);
    const hasRequest = world.day.requests.some((request) => request.missionId === mission.id);
    if (part.contacts.length > 0 || hasUnmet || hasRequest) parts.set(mission.id, part);
  }
  return parts;
};

/** The newest approval of each mission over all revisions of the day. */
const earlierApprovals = async (
  em: EntityManager,
  plan: DayPlan,
): Promise<Map<string, SignOffRow>> => {
  const rounds = await em.find(
    Round,
    { plan: { station: plan.station.id, day: plan.day } },
    { orderBy: { submittedMs: 'asc' } },
  );
  const approvals = new Map<string, SignOffRow>();
  for (const round of rounds)
    for (const signOff of await signOffsOf(em, round)) {
      if (signOff.state === 'returned') approvals.delete(signOff.mission.id);
      if (signOff.state === 'approved' || signOff.state === 'unchanged')
        approvals.set(signOff.mission.id, signOff);
    }
  return approvals;
};

export interface Planned {
  missionId: string;
  part: MissionPart;
  from: SignOffRow | null;
  consent: MissionLead | null;
}

/** Carries signatures over where the mission's part stands, and takes standing consent where all is met. */
export const planSignOffs = async (
  em: EntityManager,
  { plan, world, parts }: { plan: DayPlan; world: World; parts: Map<string, MissionPart> },
): Promise<Planned[]> => {
  const approvals = await earlierApprovals(em, plan);
  const consents = await em.find(
    MissionLead,
    { mission: { $in: [...parts.keys()] }, standingConsent: true },
    { populate: ['user'] },
  );
  return [...parts].map(([missionId, part]) => {
    const before = approvals.get(missionId);
    const stands =
      before?.part && partStands(before.part, part, world.day.station.guardTimeSeconds);
    const allMet = part.results.every((result) => result.met);
    const consent = consents.find(
      (lead) => lead.mission.id === missionId && allMet && !lead.user.disabled,
    );
    return { missionId, part, from: (stands && before) || null, consent: consent ?? null };
  });
};

export const requireSigners = async (
  em: EntityManager,
  planned: Planned[],
  submitterId: string,
): Promise<void> => {
  const open = planned.filter((one) => !one.from && !one.consent).map((one) => one.missionId);
  const leads = await eligibleLeads(em, open, submitterId);
  const orphans = open.filter((id) => !leads.some((lead) => lead.mission.id === id));
  if (orphans.length === 0) return;
  const missions = await em.find(Mission, { id: { $in: orphans } });
  const names = missions.map((mission) => mission.name).join(', ');
  throw conflict('nobody-can-sign', `Nobody can sign for ${names}: no lead other than you.`, {
    missionIds: orphans,
  });
};

export const openRound = async (
  work: Work,
  {
    person,
    plan,
    world,
    planned,
  }: { person: Person; plan: DayPlan; world: World; planned: Planned[] },
): Promise<void> => {
  const before = await lastRound(work.em, plan.id);
  const round = work.em.create(Round, {
    id: randomUUID(),
    plan: plan.id,
    number: (before?.number ?? 0) + 1,
    requirements: world.day.requirements,
    requests: world.day.requests,
    submittedById: person.id,
    submittedByName: person.name,
    submittedMs: work.nowMs,
  });
  for (const { missionId, part, from, consent } of planned)
    work.em.create(SignOffRow, {
      id: randomUUID(),
      round: round.id,
      mission: missionId,
      state: from ? 'unchanged' : consent ? 'approved' : 'pending',
      by: from?.by?.id ?? consent?.user.id ?? null,
      byName: from?.byName ?? consent?.user.name ?? null,
      atMs: from?.atMs ?? (consent ? work.nowMs : null),
      comment: consent && !from ? 'Standing consent: all requirements are met.' : null,
      // A carried signature stays bound to what was really signed, so that small shifts do not add up.
      part: from?.part ?? part,
      digest: digestOf(from?.part ?? part),
    });
  await work.em.flush();
};
