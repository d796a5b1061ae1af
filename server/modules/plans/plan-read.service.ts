import type { EntityManager } from '@mikro-orm/sqlite';
import type { ContactModel, DayModel } from '../../../shared/schedule/model.ts';
import { scorePlan, type PlanScore } from '../../../shared/schedule/score/score-plan.ts';
import { dayInterval, MINUTE_MS } from '../../../shared/time.ts';
import type { Score } from '../../../shared/schemas/plan.ts';
import { reader, type Deps, type Person } from '../../deps.ts';
import { notFound } from '../../errors.ts';
import { listPage, type PageWish } from '../../paging.ts';
import { visibleTo } from '../../visible-to.ts';
import { MissionLead } from '../missions/mission.entity.ts';
import { Station } from '../stations/station.entity.ts';
import { Contact, PlannedContact } from './contact.entity.ts';
import { toContactModel } from './contact-model.ts';
import { contactsOf } from './day-model.ts';
import { DayPlan } from './plan.entity.ts';
import { Round, SignOffRow } from './sign-off.entity.ts';
import type { World, Worlds } from './world.ts';

export interface PlanFilter extends PageWish {
  stationId?: string | undefined;
  fromDay?: string | undefined;
  toDay?: string | undefined;
  state?: DayPlan['state'] | undefined;
}

export const listPlans = (em: EntityManager, filter: PlanFilter) =>
  listPage<DayPlan>(em, DayPlan, filter, {
    sort: 'day',
    where: {
      $and: [
        filter.stationId ? { station: filter.stationId } : {},
        filter.fromDay ? { day: { $gte: filter.fromDay } } : {},
        filter.toDay ? { day: { $lte: filter.toDay } } : {},
        filter.state ? { state: filter.state } : {},
      ],
    },
  });

export const getPlan = async (em: EntityManager, id: string): Promise<DayPlan> => {
  const plan = await em.findOne(DayPlan, id);
  if (!plan) throw notFound('The plan');
  return plan;
};

/** The plan that a contact is to be changed on: the unreleased revision that holds it, else the newest. */
export const planOfContact = async (
  em: EntityManager,
  person: Person,
  contactId: string,
): Promise<DayPlan> => {
  const contact = await em.findOne(Contact, contactId, { populate: ['satellite'] });
  if (!contact || !visibleTo(person).mission(contact.satellite.mission.id))
    throw notFound('The contact');
  const rows = await em.find(PlannedContact, { contact: contactId }, { populate: ['plan'] });
  const plans = rows.map((row) => row.plan).sort((a, b) => b.revision - a.revision);
  const unreleased = plans.find((plan) => !['released', 'superseded'].includes(plan.state));
  const plan = unreleased ?? plans[0];
  if (plan) return em.findOneOrFail(DayPlan, plan.id);
  throw notFound('The contact');
};

export const lastRound = async (em: EntityManager, planId: string): Promise<Round | null> =>
  (await em.find(Round, { plan: planId }, { orderBy: { number: 'desc' }, limit: 1 }))[0] ?? null;

export const signOffsOf = (em: EntityManager, round: Round): Promise<SignOffRow[]> =>
  em.find(SignOffRow, { round: round.id }, { populate: ['mission'], orderBy: { id: 'asc' } });

/** While a round is open its copies of requirements and requests are what is judged. */
export const asAsked = (day: DayModel, round: Round | null): DayModel =>
  round ? { ...day, requirements: round.requirements, requests: round.requests } : day;

/** A plan with everything that is needed to judge and show it. */
export interface PlanView {
  plan: DayPlan;
  station: Station;
  rows: PlannedContact[];
  contacts: ContactModel[];
  world: World;
  round: Round | null;
  signOffs: SignOffRow[];
  score: PlanScore;
}

const ROUND_COUNTS = new Set<DayPlan['state']>(['in-review', 'approved', 'released', 'superseded']);

export const viewPlan = async (deps: Deps, worlds: Worlds, id: string): Promise<PlanView> => {
  const em = reader(deps);
  const plan = await getPlan(em, id);
  const world = await worlds.of(plan);
  const rows = await contactsOf(em, [plan.id]);
  const round = await lastRound(em, plan.id);
  const contacts = rows.map(toContactModel);
  const day = asAsked(world.day, ROUND_COUNTS.has(plan.state) ? round : null);
  return {
    plan,
    station: world.station,
    rows,
    contacts,
    world,
    round,
    signOffs: round ? await signOffsOf(em, round) : [],
    score: scorePlan(day, contacts),
  };
};

export const storedScore = (world: World, contacts: readonly ContactModel[]): Score => {
  const score = scorePlan(world.day, contacts);
  const passes = world.day.passes.filter((pass) => pass.toMs > world.day.day.fromMs);
  return {
    contacts: contacts.length,
    passes: passes.length,
    minutes: Math.round(score.receiveMinutes * 10) / 10,
    requirementsMet: score.requirementsMet + score.requestsMet,
    requirementsShort: score.requirementsUnmet + score.requestsUnmet,
  };
};

/** When the missions' signatures are due. */
export const cutOffMs = (plan: DayPlan, station: Station): number =>
  dayInterval(plan.day).fromMs - station.signOffCutOffMinutes * MINUTE_MS;

/** Leads of missions who may sign a plan: with the role, in service, not the submitter. */
export const eligibleLeads = async (
  em: EntityManager,
  missionIds: string[],
  submitterId: string | null,
) => {
  const leads = await em.find(
    MissionLead,
    { mission: { $in: missionIds } },
    { populate: ['user'] },
  );
  return leads.filter(
    ({ user }) => !user.disabled && user.roles.includes('lead') && user.id !== submitterId,
  );
};
