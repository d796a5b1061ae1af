import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { DAY_MS, dayOf, HOUR_MS, MINUTE_MS } from '../../shared/time.ts';
import type { Plan } from '../../shared/schemas/plan.ts';
import { PlanStory, seen } from '../support/plan-story.ts';
import {
  freshFile,
  NOW,
  predictSmallWorld,
  startTestApp,
  type TestApp,
} from '../support/test-app.ts';

let test: TestApp;
let story: PlanStory;
let dayMs = Date.parse('2026-12-02T00:00:00.000Z');
const fresh = async (): Promise<void> => {
  test = await startTestApp();
  await predictSmallWorld(test);
};
beforeAll(fresh, 60_000);
afterAll(() => test.close());
/** Every test has a day of its own. */
beforeEach(async () => {
  test.at(NOW);
  dayMs += DAY_MS;
  if (isSpoilt || dayMs >= NOW + 9 * DAY_MS) {
    isSpoilt = false;
    await test.close();
    await fresh();
    dayMs = Date.parse('2026-12-03T00:00:00.000Z');
  }
  story = await new PlanStory(test).begin(dayOf(dayMs));
  await story.assign();
}, 60_000);
/** For a test that changes the world itself: the next one begins with a new one. */
let isSpoilt = false;
const spoilWorld = (): void => {
  isSpoilt = true;
};

const statesOf = async () =>
  Object.fromEntries((await story.read()).signOffs.map((one) => [one.missionName, one.state]));

describe('sign-off', () => {
  it('goes from draft over review and approval to release, by four eyes', async () => {
    await story.submit();
    expect(await statesOf()).toEqual({ Alder: 'pending', Birch: 'pending' });
    const early = await story.post('/release');
    expect(early.status).toBe(409);
    expect((await story.sign('scheduler', 'alder', 'approve')).status).toBe(403);
    expect((await story.sign('lead2', 'alder', 'approve')).status).toBe(403);
    expect((await story.sign('lead', 'alder', 'approve')).status).toBe(200);
    expect((await story.sign('lead', 'alder', 'approve')).status).toBe(409);
    expect((await story.sign('lead2', 'birch', 'approve')).status).toBe(200);
    expect((await story.read()).state).toBe('approved');
    await story.release();
    const [contact] = seen((await story.read()).contacts);
    const scheduler = await test.as('scheduler');
    const frozen = await scheduler
      .patch(`/api/contacts/${contact?.id}`)
      .set('if-match', await story.tag())
      .send({ locked: true });
    expect(frozen.status).toBe(409);
    const audit = await (await test.as('admin')).get('/api/audit-events?limit=50').expect(200);
    const actions = (audit.body as { items: { action: string }[] }).items.map((one) => one.action);
    for (const step of ['plan.create', 'plan.assign', 'plan.submit', 'plan.sign', 'plan.release'])
      expect(actions).toContain(step);
  });

  it('a return needs a reason, makes it a draft, and a carried signature stands while the part does', async () => {
    await story.submit();
    await story.sign('lead', 'alder', 'approve');
    expect((await story.sign('lead2', 'birch', 'return')).status).toBe(422);
    expect((await story.sign('lead2', 'birch', 'return', 'One more before noon')).status).toBe(200);
    const returned = await story.read('lead2');
    expect(returned.state).toBe('draft');
    expect(returned.returned?.comment).toBe('One more before noon');

    // Another receive channel for Birch: nothing that Alder signed has changed.
    const birch = seen((await story.read()).contacts).find(
      (one) => one.missionId === test.missions.birch,
    );
    const free = ['R1', 'R2', 'R3', 'R4']
      .map((label) => test.channels[label])
      .find((id) => id !== birch?.receive.channelId);
    const moved = await story.post('/edits', {
      edits: [{ op: 'change', contactId: birch?.id, receive: { channelId: free } }],
    });
    expect(moved.status).toBe(200);
    await story.submit();
    expect(await statesOf()).toEqual({ Alder: 'unchanged', Birch: 'pending' });
    expect((await story.sign('lead2', 'birch', 'approve')).status).toBe(200);
    expect((await story.read()).state).toBe('approved');
  });

  it('a signature does not carry over when the mission’s own times move beyond the guard time', async () => {
    await story.submit();
    await story.signAll();
    await story.expectStep('/withdraw', { reason: 'One contact too many' }, 'draft');
    const alder = seen((await story.read()).contacts).find(
      (one) => one.missionId === test.missions.alder,
    );
    const to = Date.parse(alder?.receive.toUtc ?? '');
    await story.post('/edits', {
      edits: [
        {
          op: 'change',
          contactId: alder?.id,
          receive: { toUtc: new Date(to - 20_000).toISOString() },
        },
      ],
    });
    await story.submit();
    expect(await statesOf()).toEqual({ Alder: 'pending', Birch: 'unchanged' });
  });

  it('an unchanged plan is approved at once when it is submitted again', async () => {
    await story.submit();
    await story.signAll();
    expect((await story.post('/withdraw')).status).toBe(422);
    await story.expectStep('/withdraw', { reason: 'Second thoughts' }, 'draft');
    await story.submit('approved');
    expect(await statesOf()).toEqual({ Alder: 'unchanged', Birch: 'unchanged' });
  });

  it('names the missions for which nobody can sign', async () => {
    spoilWorld();
    const admin = await test.as('admin');
    const { body } = await admin.get(`/api/missions/${test.missions.birch}`).expect(200);
    const { id, version } = body as { id: string; version: number };
    await admin
      .patch(`/api/missions/${id}`)
      .set('if-match', `"${id}-v${version}"`)
      .send({ leadIds: [test.people.both.id] })
      .expect(200);
    const refused = await story.post('/submit', {}, 'both');
    expect(refused.status).toBe(409);
    expect(refused.body).toMatchObject({ code: 'nobody-can-sign', missionIds: [id] });
    expect((refused.body as { detail: string }).detail).toContain('Birch');
    await story.submit();
    // Who submitted never signs, even as a lead of the mission.
    expect((await story.sign('both', 'birch', 'approve')).status).toBe(200);
  });

  it('after the cut-off the scheduler may release without a signature, with a reason that stays', async () => {
    await story.submit();
    await story.sign('lead', 'alder', 'approve');
    test.at(dayMs - 7 * HOUR_MS);
    expect((await story.read()).allowedActions).not.toContain('release');
    expect((await story.post('/release')).status).toBe(409);
    test.at(dayMs - 5 * HOUR_MS);
    const scheduler = await story.read();
    expect(scheduler.allowedActions).toContain('release');
    expect((await story.post('/release')).status).toBe(422);
    await story.expectStep(
      '/release',
      { reasonForMissingSignatures: 'Lead of Birch cannot be reached' },
      'released',
    );
    expect(await statesOf()).toEqual({ Alder: 'approved', Birch: 'pending' });
  });
});

describe('requirements in a round', () => {
  it('a lead judges what was asked when the plan was submitted', async () => {
    spoilWorld();
    await story.submit();
    const before = (await story.read('lead')).requirements;
    const lead = await test.as('lead');
    const lines = await lead.get('/api/requirements').expect(200);
    const [line] = (lines.body as { items: { id: string; version: number }[] }).items;
    await lead
      .patch(`/api/requirements/${line?.id}`)
      .set('if-match', `"${line?.id}-v${line?.version}"`)
      .send({ least: 9 })
      .expect(200);
    expect((await story.read('lead')).requirements).toEqual(before);
    await story.expectStep('/withdraw', {}, 'draft');
    expect((await story.read('lead')).requirements.map((one) => one.asked)).toEqual([9, 9]);
  });
});

describe('revisions', () => {
  it('begin as a copy with the same contacts, one at a time, and supersede on release', async () => {
    await story.submit();
    await story.signAll();
    await story.release();
    const first = story.planId;
    const before = seen((await story.read()).contacts);
    const made = await story.post('/revise');
    expect(made.status).toBe(201);
    const copy = made.body as { id: string; revision: number; contacts: object[] };
    expect(copy.revision).toBe(2);
    expect(seen(copy.contacts as never).map((one) => one.id)).toEqual(before.map((one) => one.id));
    expect((await story.post('/revise')).status).toBe(409);

    story.planId = copy.id;
    const [contact] = before;
    await story.post('/edits', { edits: [{ op: 'remove', contactId: contact?.id }] });
    const scheduler = await test.as('scheduler');
    const changes = await scheduler.get(`/api/plans/${copy.id}/changes`).expect(200);
    expect(changes.body).toMatchObject({ againstRevision: 1, added: [], changed: [] });
    expect((changes.body as { removed: { id: string }[] }).removed[0]?.id).toBe(contact?.id);
    await story.submit();
    for (const [who, mission] of [
      ['lead', 'alder'],
      ['lead2', 'birch'],
    ] as const)
      // prettier-ignore
      if ((await statesOf())[mission === 'alder' ? 'Alder' : 'Birch'] === 'pending')
        await story.sign(who, mission, 'approve');
    await story.release();
    const old = await scheduler.get(`/api/plans/${first}`).expect(200);
    expect((old.body as { state: string }).state).toBe('superseded');
    const list = await scheduler
      .get(`/api/plans?fromDay=${dayOf(dayMs)}&toDay=${dayOf(dayMs)}`)
      .expect(200);
    expect((list.body as { items: object[] }).items).toHaveLength(2);
  });

  it('repairs before it re-plans: what is not broken stays', async () => {
    await story.submit();
    await story.expectStep('/withdraw', {}, 'draft');
    const before = seen((await story.read()).contacts);
    await story.assign();
    const after = seen((await story.read()).contacts);
    expect(after.map((one) => [one.id, one.receive])).toEqual(
      before.map((one) => [one.id, one.receive]),
    );
  });
});

describe('the running day', () => {
  const inForce = async (): Promise<void> => {
    await story.submit();
    await story.signAll();
    await story.release();
    test.at(dayMs + 5 * MINUTE_MS);
  };
  const operate = async (body: object, who: 'operator' | 'lead' | 'scheduler' = 'operator') => {
    const answer = await story.post('/operational-changes', body, who);
    if (answer.status === 201) story.planId = (answer.body as { id: string }).id;
    return answer;
  };

  it('is repaired by revisions that are released at once, and tells the missions concerned', async () => {
    await inForce();
    const contacts = seen((await story.read()).contacts);
    const length = ({ receive }: (typeof contacts)[number]): number =>
      Date.parse(receive.toUtc) - Date.parse(receive.fromUtc);
    // The longest: it is shortened below and must keep its minimum.
    const [second, first] = contacts
      .filter((one) => one.missionId === test.missions.alder)
      .sort((a, b) => length(b) - length(a));
    if (!first || !second) throw new Error('no contacts');
    const wish = { kind: 'cancel', contactId: first.id, reason: 'Receiver down', caller: 'Alder' };
    expect((await operate(wish, 'lead')).status).toBe(403);
    expect((await operate({ ...wish, reason: '' })).status).toBe(422);
    const cancelled = await operate(wish);
    expect(cancelled.status).toBe(201);
    expect(cancelled.body).toMatchObject({ state: 'released', revision: 2 });
    const other =
      second.receive.channelId === test.channels.R5 ? test.channels.R6 : test.channels.R5;
    const moved = await operate({
      kind: 'move-leg',
      contactId: second.id,
      direction: 'receive',
      channelId: other,
      reason: 'Noise on the other channel',
    });
    expect(moved.body).toMatchObject({ revision: 3, state: 'released' });
    const shorter = await operate({
      kind: 'shorten',
      contactId: second.id,
      toUtc: new Date(Date.parse(second.receive.toUtc) - 30_000).toISOString(),
      reason: 'Crew needs the channel',
    });
    expect(shorter.body).toMatchObject({ revision: 4 });
    const longer = await operate({
      kind: 'shorten',
      contactId: second.id,
      toUtc: new Date(Date.parse(second.receive.toUtc) + 30_000).toISOString(),
      reason: 'More',
    });
    expect(longer.status).toBe(422);

    const mails = await (await test.as('admin')).get('/api/mails?limit=200').expect(200);
    const items = (mails.body as { items: { subject: string; toAddress: string }[] }).items;
    const running = items.filter((one) =>
      one.subject.endsWith(`plan of ${dayOf(dayMs)} was changed`),
    );
    // Cancelled and shortened concern Alder; a channel number concerns nobody outside.
    expect(running.map((one) => one.toAddress)).toEqual(['lead@test.example', 'lead@test.example']);
  });

  it('takes an urgent contact, and displaces others only for a spacecraft emergency', async () => {
    await inForce();
    const contacts = seen((await story.read()).contacts);
    const victim = contacts.find((one) => one.missionId === test.missions.alder);
    if (!victim) throw new Error('no contact');
    await operate({ kind: 'cancel', contactId: victim.id, reason: 'Make room' });
    const urgent = {
      kind: 'add-urgent',
      passId: victim.passId,
      receive: victim.receive,
      transmit: null,
      reason: 'Safe mode',
      caller: 'Alder control',
    };
    const added = await operate(urgent);
    expect(added.status).toBe(201);
    const made = seen((await story.read()).contacts).find((one) => one.passId === victim.passId);
    const displacing = { ...urgent, displaces: [made?.id] };
    const refused = await operate(displacing);
    expect(refused.body).toMatchObject({ code: 'emergency-needed' });
    const emergency = await operate({ ...displacing, spacecraftEmergency: true });
    expect(emergency.status).toBe(201);
    const now = seen((await story.read()).contacts).find((one) => one.passId === victim.passId);
    expect(now).toMatchObject({ emergency: true });
    const again = await operate({ ...displacing, displaces: [now?.id], spacecraftEmergency: true });
    expect(again.body).toMatchObject({ code: 'emergency-displaced' });
  });

  it('keeps a log of each contact over all revisions', async () => {
    await inForce();
    const [contact] = seen((await story.read()).contacts);
    const operator = await test.as('operator');
    const path = `/api/contacts/${contact?.id}/log`;
    await operator.get(path).expect(404);
    await operator
      .put(path)
      .send({ outcome: 'partly', cause: 'Late lock', minutes: 4 })
      .expect(200);
    await operator.put(path).send({ outcome: 'great' }).expect(422);
    await (await test.as('lead')).put(path).send({ outcome: 'served' }).expect(403);
    const logs = await operator.get(`/api/plans/${story.planId}/logs`).expect(200);
    expect((logs.body as { items: object[] }).items).toHaveLength(1);
    await operate({ kind: 'cancel', contactId: contact?.id, reason: 'It was enough' });
    await operator.get(path).expect(200);
  });

  it('what has begun or begins within the freeze time is left alone by edits', async () => {
    await story.submit();
    await story.signAll();
    await story.release();
    const revised = await story.post('/revise');
    story.planId = (revised.body as { id: string }).id;
    const [contact] = seen((await story.read()).contacts);
    test.at(Date.parse(contact?.receive.fromUtc ?? '') - 10 * MINUTE_MS);
    const refused = await story.post('/edits', {
      edits: [{ op: 'remove', contactId: contact?.id }],
    });
    expect(refused.status).toBe(409);
    expect(refused.body).toMatchObject({ code: 'frozen' });
  });
});

describe('fresh elements', () => {
  const inForce = async (): Promise<Plan> => {
    const scheduler = await test.as('scheduler');
    const { body } = await scheduler
      .get(`/api/plans?fromDay=${dayOf(dayMs)}&toDay=${dayOf(dayMs)}&state=released`)
      .expect(200);
    story.planId = (body as { items: { id: string }[] }).items[0]?.id ?? '';
    return story.read();
  };
  const upload = async (anomalyShiftDeg: number): Promise<void> => {
    const { bytes } = freshFile([91001], NOW - HOUR_MS, anomalyShiftDeg);
    await (
      await test.as('operator')
    )
      .post('/api/element-set-uploads')
      .attach('file', bytes, 'fresh.tle')
      .expect(201);
    await test.app.jobs.idle();
  };
  const alderOne = (plan: Plan) =>
    seen(plan.contacts).filter((one) => one.satelliteName === 'Alder 1');

  it('change nothing within the guard time', async () => {
    spoilWorld();
    await story.submit();
    await story.signAll();
    await story.release();
    const before = await story.read();
    // 0.2 degrees of mean anomaly at 15.05 revolutions a day are 3.2 s; the guard time is 5 s.
    await upload(-0.2);
    const after = await inForce();
    expect(after.revision).toBe(1);
    expect(alderOne(after).map((one) => [one.receive, one.driftSeconds])).toEqual(
      alderOne(before).map((one) => [one.receive, null]),
    );
  });

  it('move a released contact along, or mark it as drifted by its seconds where it would clash', async () => {
    spoilWorld();
    await story.submit();
    await story.signAll();
    await story.release();
    const before = alderOne(await story.read());
    const [stuck] = before;
    if (!stuck || before.length < 2) throw new Error('no contacts');
    const end = Date.parse(stuck.receive.toUtc);
    await (
      await test.as('operator')
    )
      .post('/api/closures')
      .send({
        scope: 'channel',
        scopeId: stuck.receive.channelId,
        direction: 'receive',
        fromUtc: new Date(end + 3_000).toISOString(),
        toUtc: new Date(end + 60_000).toISOString(),
        reducedByDb: null,
        reason: 'Cable check',
      })
      .expect(201);
    // 0.7 degrees are 11.2 s.
    await upload(-0.7);
    const plan = await inForce();
    expect(plan.revision).toBe(2);
    const after = alderOne(plan);
    const drifted = after.filter((one) => one.driftSeconds !== null);
    expect(drifted.map((one) => one.id)).toEqual([stuck.id]);
    expect(drifted[0]?.receive).toEqual(stuck.receive);
    expect(drifted[0]?.driftSeconds ?? 0).toBeGreaterThan(9);
    expect(drifted[0]?.driftSeconds ?? 0).toBeLessThan(13);
    for (const one of after.filter((contact) => contact.id !== stuck.id)) {
      const old = before.find((contact) => contact.id === one.id);
      const shift = Date.parse(one.receive.fromUtc) - Date.parse(old?.receive.fromUtc ?? '');
      expect(shift).toBeGreaterThan(8_000);
      expect(shift).toBeLessThan(14_000);
    }
    const mails = await (await test.as('admin')).get('/api/mails?limit=300').expect(200);
    const told = (mails.body as { items: { subject: string; toAddress: string }[] }).items.filter(
      (one) => one.subject.includes('fresh element sets'),
    );
    expect(told.map((one) => one.toAddress).sort()).toEqual([
      'lead@test.example',
      'operator@test.example',
    ]);
  });
});

describe('a closure', () => {
  it('lists the contacts it hits, each with a proposal that holds', async () => {
    const contact = seen((await story.read()).contacts).find((one) => one.transmit);
    if (!contact?.transmit) throw new Error('no contact');
    const operator = await test.as('operator');
    const close = async (scopeId: string | undefined, direction: string, scope = 'channel') => {
      const { body } = await operator
        .post('/api/closures')
        .send({
          scope,
          scopeId,
          direction,
          fromUtc: contact.receive.fromUtc,
          toUtc: contact.receive.toUtc,
          reducedByDb: null,
          reason: 'Maintenance',
        })
        .expect(201);
      const { id, version } = body as { id: string; version: number };
      const hits = await operator.get(`/api/closures/${id}/hits`).expect(200);
      await operator
        .delete(`/api/closures/${id}`)
        .set('if-match', `"${id}-v${version}"`)
        .expect(204);
      return (
        hits.body as { items: { contactId: string; outcome: string; edits: object[] }[] }
      ).items.filter((one) => one.contactId === contact.id);
    };
    const [moved] = await close(contact.receive.channelId, 'receive');
    expect(moved?.outcome).toBe('other-channel');
    const done = await story.post('/edits', { edits: moved?.edits ?? [] });
    expect(done.status).toBe(200);
    const [lost] = await close(test.stationId, 'both', 'station');
    expect(lost?.outcome).toBe('lost');
    const [half] = await close(test.faceId, 'transmit', 'face');
    expect(half?.outcome).toBe('receive-still-good');
  });
});

describe('standing consent', () => {
  it('signs by itself while all requirements are met', async () => {
    spoilWorld();
    const lead = await test.as('lead');
    const path = `/api/missions/${test.missions.alder}/standing-consent`;
    await lead.put(path).send({ given: true }).expect(204);
    await (await test.as('lead2')).put(path).send({ given: true }).expect(404);
    await story.submit();
    expect(await statesOf()).toEqual({ Alder: 'approved', Birch: 'pending' });
  });
});

describe('over midnight', () => {
  it('a neighbouring day’s contacts take their channels', async () => {
    const next = await new PlanStory(test).begin(dayOf(dayMs + DAY_MS));
    spoilWorld();
    const scheduler = await test.as('scheduler');
    const facts = await scheduler.get(`/api/plans/${next.planId}/facts`).expect(200);
    const { busy } = facts.body as { busy: { contactId: string | null; toUtc: string }[] };
    const own = seen((await story.read()).contacts).length;
    expect(busy.filter((one) => one.contactId === null).length).toBeGreaterThanOrEqual(own);
  });
});
