import { can, type Actor } from '../../../shared/policy.ts';
import {
  PlanAction,
  type AnyContact,
  type Contact as ContactAnswer,
  type Leg,
  type Plan as PlanAnswer,
  type PlanSummary,
  type SignOff,
} from '../../../shared/schemas/plan.ts';
import type { Violation as ViolationAnswer } from '../../../shared/schemas/problem.ts';
import type { RequirementResult as ResultAnswer } from '../../../shared/schemas/requirement.ts';
import type { LegModel, Violation } from '../../../shared/schedule/model.ts';
import type { RequirementResult } from '../../../shared/schedule/score/requirements.ts';
import { SECOND_MS, toIso } from '../../../shared/time.ts';
import type { Person } from '../../deps.ts';
import { visibleTo } from '../../visible-to.ts';
import type { Station } from '../stations/station.entity.ts';
import { contactFigures } from './contact-figures.ts';
import type { PlannedContact } from './contact.entity.ts';
import { toContactModel } from './contact-model.ts';
import type { DayPlan } from './plan.entity.ts';
import { planWarnings } from './plan-warnings.ts';
import { cutOffMs, type PlanView } from './plan-read.service.ts';
import type { SignOffRow } from './sign-off.entity.ts';
import type { World } from './world.ts';

const presentLeg = (leg: LegModel): Leg => ({
  channelId: leg.channelId,
  fromUtc: toIso(leg.fromMs),
  toUtc: toIso(leg.toMs),
});

/** Seconds by which fresh elements moved the pass beyond its guard time; null within it. */
export const driftSeconds = (world: World, row: PlannedContact): number | null => {
  const pass = world.context.passes.get(row.contact.pass.id);
  const satellite = world.context.satellites.get(row.contact.satellite.id);
  if (!pass || pass.predictionId === row.prediction.id) return null;
  const shift = (pass.tcaMs - row.prediction.tcaMs) / SECOND_MS;
  const guard = satellite?.guardTimeSeconds ?? world.day.station.guardTimeSeconds;
  return Math.abs(shift) > guard ? Math.round(shift * 1000) / 1000 : null;
};

export const presentContact = (world: World, row: PlannedContact, person: Person): AnyContact => {
  const model = toContactModel(row);
  const legs = {
    id: model.id,
    faceId: model.faceId,
    receive: presentLeg(model.receive),
    transmit: model.transmit && presentLeg(model.transmit),
  };
  if (!visibleTo(person).mission(model.missionId)) return { ...legs, hidden: true };
  const pass = world.context.passes.get(model.passId);
  const source = pass && world.sources.get(pass.predictionId);
  return {
    ...legs,
    passId: model.passId,
    satelliteId: model.satelliteId,
    satelliteName: row.contact.satellite.name,
    missionId: model.missionId,
    locked: model.locked,
    emergency: row.contact.emergency,
    ...contactFigures(world, model),
    elementSetId: source?.elementSetId ?? row.prediction.elementSet.id,
    driftSeconds: driftSeconds(world, row),
    note: row.note,
  } satisfies ContactAnswer;
};

export const presentSignOff = (row: SignOffRow): SignOff => ({
  missionId: row.mission.id,
  missionName: row.mission.name,
  state: row.state,
  byName: row.byName ?? null,
  atUtc: row.atMs == null ? null : toIso(row.atMs),
  comment: row.comment ?? null,
});

const POLICY_OF: Record<PlanAction, Parameters<typeof can>[1]> = {
  edit: 'plan.edit',
  assign: 'plan.assign',
  'set-limit': 'plan.set-limit',
  submit: 'plan.submit',
  withdraw: 'plan.withdraw',
  release: 'plan.release',
  revise: 'plan.revise',
  sign: 'plan.sign',
  operate: 'plan.operate',
};

/** Missions in review that the person may sign now. */
const signable = (plan: DayPlan, signOffs: SignOffRow[], actor: Actor): string[] =>
  signOffs
    .filter((one) => one.state === 'pending')
    .map((one) => one.mission.id)
    .filter((missionId) =>
      can(actor, 'plan.sign', {
        state: plan.state,
        missionId,
        submittedById: plan.submittedById ?? null,
      }),
    );

const allowedActions = (
  plan: DayPlan,
  {
    actor,
    signableCount,
    isPastCutOff,
  }: { actor: Actor; signableCount: number; isPastCutOff: boolean },
): PlanAction[] =>
  PlanAction.options.filter((action) => {
    if (action === 'sign') return signableCount > 0;
    if (action === 'release' && plan.state === 'in-review' && !isPastCutOff) return false;
    return can(actor, POLICY_OF[action], { state: plan.state });
  });

interface SummaryParts {
  plan: DayPlan;
  station: Station;
  signOffs: SignOffRow[];
  person: Person;
  nowMs: number;
}

export const presentSummary = ({
  plan,
  station,
  signOffs,
  person,
  nowMs,
}: SummaryParts): PlanSummary => {
  const visible = visibleTo(person);
  const own = signOffs.filter((one) => visible.mission(one.mission.id));
  const signableMissionIds = signable(plan, own, person);
  const returned = own.find((one) => one.state === 'returned');
  const cutOff = cutOffMs(plan, station);
  return {
    id: plan.id,
    stationId: plan.station.id,
    day: plan.day,
    revision: plan.revision,
    version: plan.contentVersion,
    state: plan.state,
    limitOfDayDb: plan.limitOfDayDb,
    needsAttention: attention(plan, visible.everything),
    returned:
      plan.state === 'draft' && returned
        ? {
            missionId: returned.mission.id,
            byName: returned.byName ?? '',
            comment: returned.comment ?? '',
            atUtc: toIso(returned.atMs ?? 0),
          }
        : null,
    updatedUtc: toIso(plan.updatedMs),
    submittedBy: plan.submittedByName ?? null,
    cutOffUtc: toIso(cutOff),
    score: plan.score,
    signOffs: own.map(presentSignOff),
    allowedActions: allowedActions(plan, {
      actor: person,
      signableCount: signableMissionIds.length,
      isPastCutOff: nowMs >= cutOff,
    }),
    signableMissionIds,
  };
};

/** The sentence names satellites of every mission; a lead reads only that there is something. */
const attention = (plan: DayPlan, seesEverything: boolean): string | null => {
  if (plan.needsAttention == null) return null;
  return seesEverything ? plan.needsAttention : 'A change elsewhere breaks a rule of this plan.';
};

const UNIT = { contacts: 'contacts', minutes: 'min', gap: 'min', volume: 'Mbit' } as const;
const LABEL = {
  contacts: 'Contacts in the day',
  minutes: 'Contact time',
  gap: 'Longest gap between contacts',
  volume: 'Volume',
} as const;

export const presentResult = (world: World, result: RequirementResult): ResultAnswer => {
  const satellite = result.satelliteId && world.context.satellites.get(result.satelliteId);
  return {
    requirementId: result.requirementId,
    missionId: result.missionId,
    satelliteId: result.satelliteId,
    label: satellite ? `${LABEL[result.what]}, ${satellite.name}` : LABEL[result.what],
    asked: result.asked,
    given: Number.isFinite(result.given) ? result.given : null,
    unit: UNIT[result.what],
    met: result.met,
    note: result.note ?? '',
  };
};

export const presentPlan = (view: PlanView, person: Person, nowMs: number): PlanAnswer => {
  const { plan, world } = view;
  const visible = visibleTo(person);
  return {
    ...presentSummary({ ...view, person, nowMs }),
    contacts: view.rows.map((row) => presentContact(world, row, person)),
    requirements: view.score.requirements
      .filter((result) => visible.mission(result.missionId))
      .map((result) => presentResult(world, result)),
    warnings: visible.everything ? planWarnings(view, plan) : [],
  };
};

export const presentViolation = (violation: Violation): ViolationAnswer => ({
  rule: violation.rule,
  message: violation.message,
  contactIds: violation.contactIds,
  fromUtc: toIso(violation.fromMs),
  toUtc: toIso(violation.toMs),
  value: violation.value,
  limit: violation.limit,
  unit: violation.unit,
});
