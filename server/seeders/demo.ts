import { randomUUID } from 'node:crypto';
import { readFileSync } from 'node:fs';
import { resolve } from 'node:path';
import { readElementSets, type ReadElementSet } from '../../shared/orbit/element-reader.ts';
import { dayOf, DAY_MS, dayStart, HOUR_MS, MINUTE_MS, SECOND_MS } from '../../shared/time.ts';
import { createApp, type App } from '../app.ts';
import { SettableClock } from '../clock.ts';
import { reader, type Deps, type Person } from '../deps.ts';
import { EventBus } from '../events.ts';
import { tagOf } from '../middleware/tags.ts';
import { uploadElementSets } from '../modules/element-sets/upload.service.ts';
import { createMission } from '../modules/missions/mission.service.ts';
import { createRequirement } from '../modules/missions/requirement.service.ts';
import { putContactLog } from '../modules/plans/contact-log.service.ts';
import { contactsOf } from '../modules/plans/day-model.ts';
import { createPlan } from '../modules/plans/plan-create.service.ts';
import { releasePlan } from '../modules/plans/plan-release.service.ts';
import { signPlan } from '../modules/plans/plan-sign.service.ts';
import { submitPlan } from '../modules/plans/plan-submit.service.ts';
import { getPlan, lastRound, signOffsOf } from '../modules/plans/plan-read.service.ts';
import { startAssignment } from '../modules/plans/plan-runs.service.ts';
import { RunRow } from '../modules/runs/run.entity.ts';
import { createSatellite } from '../modules/satellites/satellite.service.ts';
import { Channel } from '../modules/stations/channel.entity.ts';
import { createClosure } from '../modules/stations/closure.service.ts';
import { createChannel, createFace, createStation } from '../modules/stations/station.service.ts';
import { hashPassword } from '../modules/sessions/password.ts';
import { Setting } from '../modules/users/setting.entity.ts';
import { User } from '../modules/users/user.entity.ts';
import { FLEET, MISSIONS, PEOPLE, STATIONS, type DemoPerson } from './demo-world.ts';
import { moveEpoch } from './write-tle.ts';

export const DEMO_PASSWORD = 'many-beams-one-array';

interface Stage {
  deps: Deps;
  app: App;
  clock: SettableClock;
  nowMs: number;
  people: Record<DemoPerson, Person>;
  missionIds: Record<string, string>;
}

/**
 * Makes the demo: an invented world, brought to life through the services as the demo people at past instants, with
 * the real solver and the real checks.
 */
export const seedDemo = async (given: Deps): Promise<void> => {
  const nowMs = given.clock.now();
  const clock = new SettableClock(dayStart(nowMs) - DAY_MS + 7 * HOUR_MS);
  const deps: Deps = { ...given, clock, bus: new EventBus() };
  const app = createApp(deps);
  try {
    await deps.orm.em.fork().insert(Setting, { key: 'seeding', value: { startedMs: nowMs } });
    const people = await addPeople(deps);
    const stage: Stage = { deps, app, clock, nowMs, people, missionIds: {} };
    const stationId = await addStations(stage);
    await addFleet(stage);
    await uploadMorning(stage);
    await addClosures(stage, stationId);
    await planDays(stage, stationId);
    await uploadFresh(stage);
    await markAsDemo(stage);
  } finally {
    app.streams.stop();
  }
};

const addPeople = async (deps: Deps): Promise<Record<DemoPerson, Person>> => {
  const passwordHash = await hashPassword(DEMO_PASSWORD);
  const em = deps.orm.em.fork();
  const people = {} as Record<DemoPerson, Person>;
  for (const [key, { name, email, roles }] of Object.entries(PEOPLE)) {
    const user = em.create(User, {
      id: randomUUID(),
      name,
      email,
      passwordHash,
      roles,
      createdMs: deps.clock.now(),
    });
    people[key as DemoPerson] = {
      id: user.id,
      name,
      email,
      roles,
      leadsMissionIds: [],
      sessionId: null,
    };
  }
  await em.flush();
  return people;
};

/** Three stations; the first is the one that is planned. */
const addStations = async ({ deps, people }: Stage): Promise<string> => {
  let first = '';
  for (const { faces, ...wish } of STATIONS) {
    const station = await createStation(deps, people.admin, wish);
    first ||= station.id;
    for (const { channels, ...face } of faces) {
      const made = await createFace(deps, people.admin, { ...face, stationId: station.id });
      for (const channel of channels)
        await createChannel(deps, people.admin, { ...channel, faceId: made.id });
    }
  }
  return first;
};

const addFleet = async (stage: Stage): Promise<void> => {
  const { deps, people } = stage;
  for (const { leads, requirements, ...wish } of MISSIONS) {
    const leadIds = leads.map((lead) => people[lead].id);
    const { mission } = await createMission(deps, people.admin, { ...wish, leadIds });
    stage.missionIds[wish.code] = mission.id;
    for (const lead of leads)
      people[lead] = {
        ...people[lead],
        leadsMissionIds: [...people[lead].leadsMissionIds, mission.id],
      };
    for (const line of requirements)
      await createRequirement(deps, people.admin, { ...line, missionId: mission.id });
  }
  for (const { missionCode, ...wish } of FLEET)
    await createSatellite(deps, people.operator, {
      wish: { ...wish, missionId: stage.missionIds[missionCode] ?? '' },
      adopt: () => Promise.resolve(),
    });
};

const demoSets = (): ReadElementSet[] =>
  readElementSets(readFileSync(resolve('tle/demo.tle')), 'demo.tle').accepted;

/** One satellite has not had fresh elements for six days. */
const STALE = 91024;
const STALE_MS = 6 * DAY_MS;

const fileOf = (
  sets: { name: string | null; line1: string; line2: string }[],
  fileName: string,
) => ({
  bytes: new TextEncoder().encode(
    sets.map((set) => `${set.name ?? ''}\n${set.line1}\n${set.line2}\n`).join(''),
  ),
  fileName,
});

const uploadMorning = async ({ deps, app, people, clock, nowMs }: Stage): Promise<void> => {
  const epochMs = dayStart(nowMs) - DAY_MS + 4 * HOUR_MS;
  const sets = demoSets().map((set) => {
    const at = set.catalogNumber === STALE ? epochMs - STALE_MS : epochMs;
    return { name: set.name, ...moveEpoch(set, at) };
  });
  clock.set(dayStart(nowMs) - DAY_MS + 8 * HOUR_MS);
  await uploadElementSets(deps, people.operator, {
    file: fileOf(sets, `morning-${dayOf(clock.now())}.tle`),
    dryRun: false,
    useFromMs: null,
  });
  await app.jobs.idle();
};

const addClosures = async ({ deps, people, nowMs, clock }: Stage, stationId: string) => {
  clock.set(dayStart(nowMs) - DAY_MS + 9 * HOUR_MS);
  const channels = await reader(deps).find(Channel, { face: { station: stationId } });
  const idOf = (label: string): string => channels.find((one) => one.label === label)?.id ?? '';
  const tomorrow = dayStart(nowMs) + DAY_MS;
  await createClosure(deps, people.operator, {
    scope: 'channel',
    scopeId: idOf('R4'),
    direction: 'receive',
    fromUtc: new Date(tomorrow + 8 * HOUR_MS).toISOString(),
    toUtc: new Date(tomorrow + 12 * HOUR_MS).toISOString(),
    reducedByDb: null,
    reason: 'RF chain replaced',
  });
  await createClosure(deps, people.operator, {
    scope: 'channel',
    scopeId: idOf('T2'),
    direction: 'transmit',
    fromUtc: new Date(tomorrow + DAY_MS + 9 * HOUR_MS).toISOString(),
    toUtc: new Date(tomorrow + DAY_MS + 10.5 * HOUR_MS).toISOString(),
    reducedByDb: null,
    reason: 'Amplifier test',
  });
};

interface Step {
  stage: Stage;
  planId: string;
}

const tagNow = async ({ stage, planId }: Step): Promise<string> =>
  tagOf(planId, (await getPlan(reader(stage.deps), planId)).contentVersion);

const assign = async (step: Step): Promise<void> => {
  const { deps, app, people } = step.stage;
  const runId = await startAssignment(deps, app, {
    person: people.scheduler,
    planId: step.planId,
    wish: { mode: 'new', timeLimitSeconds: 10 },
    ifMatch: await tagNow(step),
  });
  await app.jobs.settled(runId);
  const run = await reader(deps).findOneOrFail(RunRow, runId);
  if (run.result?.applied !== true)
    throw new Error(`The demo's plan could not be assigned: ${run.error?.detail ?? run.state}`);
};

const submit = async (step: Step): Promise<void> => {
  const { deps, app, people } = step.stage;
  await submitPlan(deps, app.worlds, {
    person: people.scheduler,
    planId: step.planId,
    ifMatch: await tagNow(step),
  });
};

const signAll = async (step: Step, isSigned: (index: number) => boolean): Promise<void> => {
  const { deps, people } = step.stage;
  const round = await lastRound(reader(deps), step.planId);
  const rows = round ? await signOffsOf(reader(deps), round) : [];
  for (const [index, row] of rows.entries()) {
    const lead = [people.lead, people.lead2].find((one) =>
      one.leadsMissionIds.includes(row.mission.id),
    );
    if (!lead || !isSigned(index) || row.state !== 'pending') continue;
    await signPlan(deps, {
      person: lead,
      planId: step.planId,
      ifMatch: await tagNow(step),
      missionId: row.mission.id,
      decision: 'approve',
      comment: '',
    });
  }
};

/** Today is released with a log under way, tomorrow in review, the day after a draft. */
const planDays = async (stage: Stage, stationId: string): Promise<void> => {
  const { deps, app, clock, nowMs, people } = stage;
  const begin = async (day: string): Promise<Step> => {
    const plan = await createPlan(deps, app.worlds, {
      person: people.scheduler,
      wish: { stationId, day },
    });
    const step = { stage, planId: plan.id };
    await assign(step);
    return step;
  };
  const today = dayStart(nowMs);
  clock.set(today - 14 * HOUR_MS);
  const first = await begin(dayOf(today));
  clock.set(today - 12 * HOUR_MS);
  await submit(first);
  clock.set(today - 10 * HOUR_MS);
  await signAll(first, () => true);
  clock.set(today - 8 * HOUR_MS);
  await releasePlan(deps, app.worlds, {
    person: people.scheduler,
    planId: first.planId,
    ifMatch: await tagNow(first),
    reason: '',
  });
  clock.set(Math.max(today - 7 * HOUR_MS, nowMs - 3 * HOUR_MS));
  const second = await begin(dayOf(today + DAY_MS));
  await submit(second);
  await signAll(second, (index) => index === 0);
  await begin(dayOf(today + 2 * DAY_MS));
  await logPast(first);
};

/** What is over has been logged, but for the last one, which waits for somebody. */
const logPast = async ({ stage, planId }: Step): Promise<void> => {
  const { deps, people, clock, nowMs } = stage;
  const rows = await contactsOf(reader(deps), [planId]);
  const past = rows.filter((row) => row.receiveToMs < nowMs).slice(0, -1);
  for (const [index, row] of past.entries()) {
    clock.set(Math.max(clock.now(), Math.min(nowMs, row.receiveToMs + 2 * MINUTE_MS)));
    const minutes = (row.receiveToMs - row.receiveFromMs) / MINUTE_MS;
    const isPartly = index % 9 === 4;
    await putContactLog(deps, people.operator, {
      contactId: row.contact.id,
      log: {
        outcome: isPartly ? 'partly' : 'served',
        cause: isPartly ? 'Late lock of the receiver' : '',
        minutes: isPartly ? Math.round(minutes - 1) : Math.round(minutes * 10) / 10,
        volumeMbit: null,
        note: '',
      },
    });
  }
};

/** One satellite of a train has manoeuvred: it comes later than planned and meets the beams of its neighbours. */
const DRIFTER = 91009;
const DRIFT_S = 75;

const uploadFresh = async ({ deps, app, people, clock, nowMs }: Stage): Promise<void> => {
  clock.set(nowMs);
  const epochMs = Math.floor((nowMs - 2 * HOUR_MS) / SECOND_MS) * SECOND_MS;
  const sets = demoSets()
    .filter((set) => set.catalogNumber === DRIFTER)
    .map((set) => ({
      name: set.name,
      ...moveEpoch(set, epochMs, {
        anomalyShiftDeg: (-set.meanMotionRevPerDay * 360 * DRIFT_S) / 86_400,
      }),
    }));
  await uploadElementSets(deps, people.operator, {
    file: fileOf(sets, `fresh-${dayOf(nowMs)}.tle`),
    dryRun: false,
    useFromMs: null,
  });
  await app.jobs.idle();
};

const markAsDemo = async ({ deps, nowMs }: Stage): Promise<void> => {
  const em = deps.orm.em.fork();
  await em.nativeDelete(Setting, { key: 'seeding' });
  em.create(Setting, {
    key: 'demo',
    value: {
      seededMs: nowMs,
      password: DEMO_PASSWORD,
      accounts: Object.values(PEOPLE).map(({ label, email }) => ({ role: label, email })),
    },
  });
  await em.flush();
};
