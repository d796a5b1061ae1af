import { randomUUID } from 'node:crypto';
import type { EntityManager } from '@mikro-orm/sqlite';
import { mayEver } from '../../../shared/policy.ts';
import type { ContactModel } from '../../../shared/schedule/model.ts';
import { scorePlan } from '../../../shared/schedule/score/score-plan.ts';
import { inTransaction, reader, type Deps, type Person, type Work } from '../../deps.ts';
import { conflict, forbidden, unprocessable } from '../../errors.ts';
import { audit } from '../audit/audit.service.ts';
import { Mission, MissionLead } from '../missions/mission.entity.ts';
import { PlannedContact } from './contact.entity.ts';
import { confirmPlan } from './confirm.ts';
import { standingContacts, tellPlan } from './contact-store.ts';
import { digestOf, missionPart, partStands, type MissionPart } from './mission-part.ts';
import { DayPlan } from './plan.entity.ts';
import { nextRevision, requireAction, requireTag, unreleasedPlan } from './plan-edits.service.ts';
import { mailLeads, mailOperators, mailScheduler } from './plan-mails.ts';
import {
  asAsked,
  cutOffMs,
  eligibleLeads,
  getPlan,
  lastRound,
  signOffsOf,
} from './plan-read.service.ts';
import { Round, SignOffRow } from './sign-off.entity.ts';
import type { World, Worlds } from './world.ts';

export interface LifeWish {
  person: Person;
  planId: string;
  ifMatch: string;
}

/** Reads a plan for a step of its life: the person's right, then the tag, both before any rule. */
const beginStep = async (
  deps: Deps,
  { person, planId, ifMatch }: LifeWish,
  action: Parameters<typeof mayEver>[1],
): Promise<DayPlan> => {
  const plan = await getPlan(reader(deps), planId);
  if (!mayEver(person, action)) throw forbidden('Your role does not allow this.');
  requireTag(plan, ifMatch);
  requireAction(person, action, plan);
  return plan;
};

/** The step's plan inside the transaction: nobody may have changed it meanwhile. */
const reread = async (work: Work, { planId, ifMatch }: LifeWish): Promise<DayPlan> => {
  const plan = await getPlan(work.em, planId);
  requireTag(plan, ifMatch);
  return plan;
};

const moveTo = (work: Work, plan: DayPlan, state: DayPlan['state']): void => {
  plan.state = state;
  plan.contentVersion += 1;
  plan.updatedMs = work.nowMs;
  tellPlan(work, plan);
};

/** Missions with contacts, unmet requirements or requests in the plan, each with its own part. */
const partsToSign = (world: World, contacts: readonly ContactModel[]): Map<string, MissionPart> => {
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

interface Planned {
  missionId: string;
  part: MissionPart;
  from: SignOffRow | null;
  consent: MissionLead | null;
}

/** Carries signatures over where the mission's part stands, and takes standing consent where all is met. */
const planSignOffs = async (
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

const requireSigners = async (
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

const openRound = async (
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

const closeRound = async (
  work: Work,
  plan: DayPlan,
  outcome: NonNullable<Round['outcome']>,
): Promise<Round | null> => {
  const round = await lastRound(work.em, plan.id);
  if (round && round.closedMs == null) {
    round.closedMs = work.nowMs;
    round.outcome = outcome;
  }
  return round;
};

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

const missingMissions = async (em: EntityManager, plan: DayPlan): Promise<SignOffRow[]> => {
  const round = await lastRound(em, plan.id);
  return round ? (await signOffsOf(em, round)).filter((one) => one.state === 'pending') : [];
};

/** Before the cut-off every signature is needed; after it the scheduler may go without, with a reason. */
const checkSignatures = async (
  deps: Deps,
  { plan, world, reason }: { plan: DayPlan; world: World; reason: string },
): Promise<void> => {
  const missing = await missingMissions(reader(deps), plan);
  if (missing.length === 0) return;
  const names = missing.map((one) => one.mission.name).join(', ');
  if (deps.clock.now() < cutOffMs(plan, world.station))
    throw conflict(
      'signatures-missing',
      `${names} have not signed, and the cut-off is not reached.`,
    );
  if (reason.length < 3)
    throw unprocessable('reason-needed', `Say why the plan goes out without ${names}.`, [
      { pointer: '/reasonForMissingSignatures', detail: 'A reason is needed' },
    ]);
};

/** approved (or in review after the cut-off) -> released; the revision before it is superseded. */
export const releasePlan = async (
  deps: Deps,
  worlds: Worlds,
  wish: LifeWish & { reason: string },
): Promise<DayPlan> => {
  const seen = await beginStep(deps, wish, 'plan.release');
  const base = await worlds.of(seen);
  await checkSignatures(deps, { plan: seen, world: base, reason: wish.reason });
  const round = await lastRound(reader(deps), seen.id);
  const world = { ...base, day: asAsked(base.day, round) };
  const contacts = await standingContacts(reader(deps), seen.id);
  await confirmPlan(deps, world, contacts);
  return inTransaction(deps, async (work) => {
    const plan = await reread(work, wish);
    await closeRound(work, plan, 'released');
    plan.missingSignaturesReason = wish.reason || null;
    await putInForce(work, plan, world);
    await audit(work, wish.person, {
      action: 'plan.release',
      entity: 'plan',
      entityId: plan.id,
      summary: `Plan of ${plan.day}, revision ${plan.revision}, released`,
      details: { contacts: contacts.length, withoutSignatures: wish.reason || null },
    });
    await mailRelease(work, plan, contacts);
    return plan;
  });
};

/** Supersedes the revision in force and keeps the names as they are now. */
export const putInForce = async (work: Work, plan: DayPlan, world: World): Promise<void> => {
  const before = await work.em.find(DayPlan, {
    station: plan.station.id,
    day: plan.day,
    state: 'released',
  });
  for (const old of before) if (old.id !== plan.id) moveTo(work, old, 'superseded');
  moveTo(work, plan, 'released');
  plan.releasedMs = work.nowMs;
  plan.releasedNames = Object.fromEntries(
    [...world.day.satellites, ...world.day.missions].map((one) => [one.id, one.name]),
  );
  await work.em.flush();
};

const mailRelease = async (
  work: Work,
  plan: DayPlan,
  contacts: readonly ContactModel[],
): Promise<void> => {
  const event = `release ${plan.id} ${plan.contentVersion}`;
  await mailLeads(work, [...new Set(contacts.map((one) => one.missionId))], (missionName) => ({
    event,
    subject: `${missionName}: the plan of ${plan.day} is released`,
    lines: [`Revision ${plan.revision} of the plan of ${plan.day} is in force.`],
  }));
  await mailOperators(work, {
    event,
    subject: `The plan of ${plan.day} is released`,
    lines: [`Revision ${plan.revision} with ${contacts.length} contacts is in force.`],
  });
};

/** A new revision starts as a copy of the released one. */
export const revisePlan = async (deps: Deps, wish: LifeWish): Promise<DayPlan> => {
  await beginStep(deps, wish, 'plan.revise');
  return inTransaction(deps, async (work) => {
    const plan = await reread(work, wish);
    const open = await unreleasedPlan(work.em, plan.station.id, plan.day);
    if (open)
      throw conflict('revision-open', `Revision ${open.revision} of this day is ${open.state}.`, {
        planId: open.id,
      });
    const copy = await copyRevision(work, plan, { person: wish.person, state: 'draft' });
    await audit(work, wish.person, {
      action: 'plan.revise',
      entity: 'plan',
      entityId: copy.id,
      summary: `Revision ${copy.revision} of ${plan.day} begun from revision ${plan.revision}`,
    });
    return copy;
  });
};

export const copyRevision = async (
  work: Work,
  plan: DayPlan,
  { person, state }: { person: Person; state: DayPlan['state'] },
): Promise<DayPlan> => {
  const { em, nowMs } = work;
  const copy = em.create(DayPlan, {
    id: randomUUID(),
    station: plan.station.id,
    day: plan.day,
    revision: await nextRevision(em, plan.station.id, plan.day),
    state,
    limitOfDayDb: plan.limitOfDayDb,
    score: plan.score,
    hasBeenReviewed: true,
    createdMs: nowMs,
    updatedMs: nowMs,
    createdById: person.id,
  });
  await em.flush();
  for (const row of await em.find(PlannedContact, { plan: plan.id }))
    em.create(PlannedContact, {
      id: randomUUID(),
      plan: copy.id,
      contact: row.contact.id,
      prediction: row.prediction.id,
      face: row.face.id,
      receiveChannel: row.receiveChannel.id,
      receiveFromMs: row.receiveFromMs,
      receiveToMs: row.receiveToMs,
      transmitChannel: row.transmitChannel?.id ?? null,
      transmitFromMs: row.transmitFromMs ?? null,
      transmitToMs: row.transmitToMs ?? null,
      locked: row.locked,
      note: row.note,
    });
  await em.flush();
  tellPlan(work, copy);
  return copy;
};
