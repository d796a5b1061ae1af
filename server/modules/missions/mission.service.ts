import { randomUUID } from 'node:crypto';
import type { EntityManager } from '@mikro-orm/sqlite';
import { can } from '../../../shared/policy.ts';
import type { CreateMission, PatchMission } from '../../../shared/schemas/mission.ts';
import { inTransaction, type Deps, type Person, type Work } from '../../deps.ts';
import { conflict, forbidden, notFound, unprocessable } from '../../errors.ts';
import { checkTag } from '../../middleware/tags.ts';
import { listPage, type PageWish } from '../../paging.ts';
import { visibleTo } from '../../visible-to.ts';
import { audit } from '../audit/audit.service.ts';
import { User } from '../users/user.entity.ts';
import { Mission, MissionLead } from './mission.entity.ts';

export const ledMissionIds = async (em: EntityManager, userId: string): Promise<string[]> =>
  (await em.find(MissionLead, { user: userId })).map((lead) => lead.mission.id);

export interface MissionWithLeads {
  mission: Mission;
  leads: User[];
}

export const withLeads = async (
  em: EntityManager,
  missions: Mission[],
): Promise<MissionWithLeads[]> => {
  const leads = await em.find(
    MissionLead,
    { mission: { $in: missions.map((mission) => mission.id) } },
    { populate: ['user'] },
  );
  return missions.map((mission) => ({
    mission,
    leads: leads.filter((l) => l.mission.id === mission.id).map((l) => l.user as User),
  }));
};

export const listMissions = async (em: EntityManager, person: Person, wish: PageWish) => {
  const found = await listPage<Mission>(em, Mission, wish, {
    sort: 'name',
    where: visibleTo(person).where('id'),
  });
  return { items: await withLeads(em, found.items), nextCursor: found.nextCursor };
};

/** The mission, or 404 when it does not exist or the person may not see it. */
export const getMission = async (
  em: EntityManager,
  person: Person,
  id: string,
): Promise<Mission> => {
  const mission = await em.findOne(Mission, id);
  if (!mission || !visibleTo(person).mission(id)) throw notFound('The mission');
  return mission;
};

export const requireMissionRight = (
  person: Person,
  action: 'edit.missions' | 'edit.requirements' | 'edit.requests',
  missionId: string,
): void => {
  if (!can(person, action, { missionId })) throw forbidden('This is for the mission’s own leads.');
};

const checkLeads = async (em: EntityManager, leadIds: string[]): Promise<void> => {
  const users = await em.find(User, { id: { $in: leadIds } });
  const wrong = leadIds.find((id) => !users.some((u) => u.id === id && u.roles.includes('lead')));
  if (wrong)
    throw unprocessable('not-a-lead', 'Only people with the role lead can lead a mission.', [
      { pointer: '/leadIds', detail: 'One of them has not the role lead' },
    ]);
};

const setLeads = async ({ em }: Work, missionId: string, leadIds: string[]): Promise<void> => {
  await checkLeads(em, leadIds);
  const present = await em.find(MissionLead, { mission: missionId });
  for (const lead of present) if (!leadIds.includes(lead.user.id)) em.remove(lead);
  for (const userId of leadIds)
    if (!present.some((lead) => lead.user.id === userId))
      em.create(MissionLead, { id: randomUUID(), mission: missionId, user: userId });
  await em.flush();
};

const refuseTaken = async (em: EntityManager, wish: PatchMission, id: string): Promise<void> => {
  for (const field of ['name', 'code'] as const) {
    const value = wish[field];
    if (value === undefined) continue;
    const other = await em.findOne(Mission, { [field]: value, id: { $ne: id } });
    if (other) throw conflict('taken', `A mission with the ${field} ${value} exists already.`);
  }
};

export const createMission = (
  deps: Deps,
  person: Person,
  wish: CreateMission,
): Promise<MissionWithLeads> =>
  inTransaction(deps, async (work) => {
    const id = randomUUID();
    await refuseTaken(work.em, wish, id);
    const { leadIds, ...fields } = wish;
    const mission = work.em.create(Mission, { id, ...fields });
    await work.em.flush();
    await setLeads(work, id, leadIds);
    await audit(work, person, {
      action: 'mission.create',
      entity: 'mission',
      entityId: id,
      missionId: id,
      summary: `Mission ${mission.name}`,
    });
    work.tell({ topic: 'fleet', id, version: mission.version });
    const [answer] = await withLeads(work.em, [mission]);
    return answer ?? { mission, leads: [] };
  });

export const patchMission = (
  deps: Deps,
  person: Person,
  { id, wish, ifMatch }: { id: string; wish: PatchMission; ifMatch: string },
): Promise<MissionWithLeads> =>
  inTransaction(deps, async (work) => {
    const mission = await getMission(work.em, person, id);
    requireMissionRight(person, 'edit.missions', id);
    checkTag(ifMatch, mission.id, mission.version, 'The mission');
    await refuseTaken(work.em, wish, id);
    if (!can(person, 'create.missions') && (wish.leadIds || wish.priority || wish.retired))
      throw forbidden('Leads, priority and retirement are the administrator’s to set.');
    if (wish.name !== undefined) mission.name = wish.name;
    if (wish.code !== undefined) mission.code = wish.code;
    if (wish.series !== undefined) mission.series = wish.series;
    if (wish.priority !== undefined) mission.priority = wish.priority;
    if (wish.retired !== undefined) mission.retired = wish.retired;
    await work.em.flush();
    if (wish.leadIds) await setLeads(work, id, wish.leadIds);
    await audit(work, person, {
      action: 'mission.change',
      entity: 'mission',
      entityId: id,
      missionId: id,
      summary: `Mission ${mission.name} changed`,
      details: { ...wish },
    });
    work.tell({ topic: 'fleet', id, version: mission.version });
    const [answer] = await withLeads(work.em, [mission]);
    return answer ?? { mission, leads: [] };
  });

/** Refused while anything refers to it; retire it then. */
export const deleteMission = (
  deps: Deps,
  person: Person,
  { id, ifMatch, inUse }: { id: string; ifMatch: string; inUse: (w: Work) => Promise<boolean> },
): Promise<void> =>
  inTransaction(deps, async (work) => {
    const mission = await getMission(work.em, person, id);
    checkTag(ifMatch, mission.id, mission.version, 'The mission');
    if (await inUse(work))
      throw conflict('in-use', `${mission.name} has satellites. Retire it instead.`);
    await work.em.nativeDelete(MissionLead, { mission: id });
    await work.em.nativeDelete(Mission, { id });
    await audit(work, person, {
      action: 'mission.delete',
      entity: 'mission',
      entityId: id,
      missionId: id,
      summary: `Mission ${mission.name} deleted`,
    });
    work.tell({ topic: 'fleet', id, version: mission.version });
  });

/** "Approve whenever my requirements are met": given and taken back by each lead for a mission of his or hers. */
export const setStandingConsent = (
  deps: Deps,
  person: Person,
  { id, given }: { id: string; given: boolean },
): Promise<void> =>
  inTransaction(deps, async (work) => {
    const mission = await getMission(work.em, person, id);
    const lead = await work.em.findOne(MissionLead, { mission: id, user: person.id });
    if (!lead) throw forbidden('Only a lead of the mission leaves standing consent.');
    lead.standingConsent = given;
    await work.em.flush();
    await audit(work, person, {
      action: 'mission.consent',
      entity: 'mission',
      entityId: id,
      missionId: id,
      summary: `${mission.name}: standing consent ${given ? 'given' : 'taken back'}`,
    });
  });
