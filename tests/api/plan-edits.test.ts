import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { EditResult, NextContact } from '../../shared/schemas/edit.ts';
import type { OpenPass, Plan } from '../../shared/schemas/plan.ts';
import { PlanStory, seen } from '../support/plan-story.ts';
import { NOW, predictSmallWorld, startTestApp, type TestApp } from '../support/test-app.ts';

let test: TestApp;
let story: PlanStory;
beforeAll(async () => {
  test = await startTestApp();
  await predictSmallWorld(test);
  story = await new PlanStory(test).begin('2026-12-03');
  await story.assign();
}, 60_000);
afterAll(() => test.close());

const iso = (ms: number): string => new Date(ms).toISOString();
const edits = (body: object[]) => story.post('/edits', { edits: body });
const good = async (body: object[]): Promise<EditResult> => {
  const answer = await edits(body);
  expect([answer.status, answer.body]).toEqual([200, expect.anything()]);
  return answer.body as EditResult;
};
const rulesOf = (answer: { body: unknown }): string[] => [
  ...new Set(
    ((answer.body as { violations?: { rule: string }[] }).violations ?? []).map((one) => one.rule),
  ),
];

describe('beginning a plan', () => {
  it('refuses a second plan for the same day and a station that does not exist', async () => {
    const scheduler = await test.as('scheduler');
    const wish = { stationId: test.stationId, day: '2026-12-03' };
    const refused = await scheduler.post('/api/plans').send(wish).expect(409);
    expect(refused.body).toMatchObject({ code: 'plan-exists' });
    await scheduler
      .post('/api/plans')
      .send({ ...wish, stationId: '00000000-0000-4000-8000-000000000000' })
      .expect(404);
    await scheduler
      .post('/api/plans')
      .send({ ...wish, day: '2026-02-30' })
      .expect(422);
    await (await test.as('operator')).post('/api/plans').send(wish).expect(403);
  });
});

describe('the assignment', () => {
  it('gives every mission its contacts, with the uplink where it is required', async () => {
    const plan = await story.read();
    const contacts = seen(plan.contacts);
    expect(contacts.length).toBeGreaterThan(8);
    for (const contact of contacts) {
      const isBirch = contact.missionId === test.missions.birch;
      if (isBirch) expect(contact.transmit).not.toBeNull();
      else expect(contact.transmit).toBeNull();
      expect(contact.maxScanLossDb ?? 9).toBeLessThanOrEqual(plan.limitOfDayDb + 0.05);
    }
    expect(plan.requirements.filter((one) => !one.met)).toEqual([]);
    expect(plan.score.contacts).toBe(contacts.length);
  });

  it('needs the tag, and one runs at a time', async () => {
    const scheduler = await test.as('scheduler');
    const path = `/api/plans/${story.planId}/assignment-runs`;
    await scheduler.post(path).send({}).expect(428);
    await scheduler.post(path).set('if-match', '"old"').send({}).expect(412);
    const first = await story.post('/assignment-runs', { timeLimitSeconds: 20 });
    expect(first.status).toBe(202);
    const second = await story.post('/assignment-runs', {});
    expect(second.status).toBe(409);
    expect(second.body).toMatchObject({
      code: 'run-in-progress',
      runId: (first.body as { runId: string }).runId,
    });
    await test.app.jobs.idle();
  });

  it('is not applied when somebody changed the plan meanwhile, and can not be applied later', async () => {
    const started = await story.post('/assignment-runs', { timeLimitSeconds: 20 });
    const { runId } = started.body as { runId: string };
    const [contact] = seen((await story.read()).contacts);
    await good([{ op: 'change', contactId: contact?.id, note: 'seen by somebody' }]);
    await test.app.jobs.settled(runId);
    const scheduler = await test.as('scheduler');
    const run = await scheduler.get(`/api/runs/${runId}`).expect(200);
    expect(run.body).toMatchObject({ state: 'succeeded', result: { applied: false } });
    await scheduler.post(`/api/runs/${runId}/apply`).expect(412);
  });
});

describe('editing by hand', () => {
  it('removes a contact and brings the same one back by its inverse', async () => {
    const [contact] = seen((await story.read()).contacts);
    if (!contact) throw new Error('no contact');
    const removed = await good([{ op: 'remove', contactId: contact.id }]);
    expect(removed.removedIds).toEqual([contact.id]);
    expect(seen((await story.read()).contacts).map((one) => one.id)).not.toContain(contact.id);
    await good(removed.inverse);
    const back = seen((await story.read()).contacts).find((one) => one.id === contact.id);
    expect(back).toMatchObject({ receive: contact.receive, transmit: contact.transmit });
  });

  it('assigns an open pass on the longest part that is allowed there', async () => {
    const plan = await story.read();
    const [contact] = seen(plan.contacts).filter((one) => one.transmit);
    if (!contact?.transmit) throw new Error('no contact with an uplink');
    await good([{ op: 'remove', contactId: contact.id }]);
    const assigned = await good([
      {
        op: 'assign',
        passId: contact.passId,
        receive: { channelId: contact.receive.channelId },
        transmit: { channelId: contact.transmit.channelId },
      },
    ]);
    const [made] = seen(assigned.contacts);
    expect(made?.receive.channelId).toBe(contact.receive.channelId);
    expect(made?.transmit).not.toBeNull();
    const length = (leg: { fromUtc: string; toUtc: string }) =>
      Date.parse(leg.toUtc) - Date.parse(leg.fromUtc);
    expect(length(made?.receive ?? contact.receive)).toBeGreaterThanOrEqual(
      length(contact.receive) - 1000,
    );
    // The undo takes the new one off again.
    expect(assigned.inverse).toEqual([{ op: 'remove', contactId: made?.id }]);
  });

  it('trims, locks, and undoes both', async () => {
    const contact = seen((await story.read()).contacts)[2];
    if (!contact) throw new Error('no contact');
    const from = Date.parse(contact.receive.fromUtc);
    const result = await good([
      {
        op: 'change',
        contactId: contact.id,
        receive: { fromUtc: iso(from + 20_000) },
        locked: true,
      },
    ]);
    expect(seen(result.contacts)[0]).toMatchObject({
      locked: true,
      receive: { fromUtc: iso(from + 20_000) },
    });
    await good(result.inverse);
    const back = seen((await story.read()).contacts).find((one) => one.id === contact.id);
    expect(back).toMatchObject({ locked: false, receive: contact.receive });
  });

  it('swaps the channels of two contacts in one call', async () => {
    const contacts = seen((await story.read()).contacts).filter(
      (one) => one.missionId === test.missions.alder,
    );
    const [a, b] = contacts;
    if (!a || !b) throw new Error('no two contacts');
    const other = test.channels.R6 ?? '';
    const target = a.receive.channelId === other ? (test.channels.R5 ?? '') : other;
    const result = await good([
      { op: 'change', contactId: a.id, receive: { channelId: target } },
      { op: 'change', contactId: b.id, receive: { channelId: a.receive.channelId } },
    ]);
    expect(result.contacts).toHaveLength(2);
    await good(result.inverse);
  });

  it('names each rule it would break, and writes nothing', async () => {
    const plan = await story.read();
    const alder = seen(plan.contacts).find((one) => one.missionId === test.missions.alder);
    const birch = seen(plan.contacts).find((one) => one.missionId === test.missions.birch);
    if (!alder || !birch) throw new Error('no contacts');
    const from = Date.parse(alder.receive.fromUtc);
    const early = await edits([
      {
        op: 'change',
        contactId: alder.id,
        receive: { fromUtc: iso(from - 3_600_000) },
      },
    ]);
    expect(early.status).toBe(409);
    expect(rulesOf(early)).toContain('outside-window');
    const unfit = await edits([
      { op: 'change', contactId: alder.id, receive: { channelId: test.channels.R1 } },
    ]);
    expect(rulesOf(unfit)).toContain('channel-unfit');
    const short = await edits([
      {
        op: 'change',
        contactId: alder.id,
        receive: { toUtc: iso(from + 30_000) },
      },
    ]);
    expect(rulesOf(short)).toContain('too-short');
    const bare = await edits([{ op: 'change', contactId: birch.id, transmit: null }]);
    expect(rulesOf(bare)).toContain('too-short');
    const twice = await edits([
      {
        op: 'assign',
        passId: alder.passId,
        receive: { ...alder.receive, channelId: test.channels.R6 },
      },
    ]);
    expect(rulesOf(twice)).toContain('duplicate');
    const message = (early.body as { violations: { message: string }[] }).violations[0]?.message;
    expect(message).toMatch(/Alder/);
    expect((await story.read()).version).toBe(plan.version);
  });

  it('a closure stops a contact, by name, and marks the plan', async () => {
    const plan = await story.read();
    const alder = seen(plan.contacts).find((one) => one.missionId === test.missions.alder);
    if (!alder) throw new Error('no contact');
    const operator = await test.as('operator');
    const closure = await operator
      .post('/api/closures')
      .send({
        scope: 'channel',
        scopeId: alder.receive.channelId,
        direction: 'receive',
        fromUtc: alder.receive.fromUtc,
        toUtc: alder.receive.toUtc,
        reducedByDb: null,
        reason: 'Amplifier test',
      })
      .expect(201);
    for (let i = 0; i < 50 && !(await story.read()).needsAttention; i++)
      await new Promise((done) => setTimeout(done, 50));
    expect((await story.read()).needsAttention).toMatch(/Amplifier test|closed/i);
    const touched = await edits([{ op: 'change', contactId: alder.id, locked: true }]);
    expect(rulesOf(touched)).toContain('closure');
    const refused = await story.post('/submit');
    expect(refused.status).toBe(409);
    expect(rulesOf(refused)).toContain('closure');
    const { id, version } = closure.body as { id: string; version: number };
    await operator.delete(`/api/closures/${id}`).set('if-match', `"${id}-v${version}"`).expect(204);
  });

  it('a dry run only judges and needs no tag', async () => {
    const plan = await story.read();
    const [contact] = seen(plan.contacts);
    const scheduler = await test.as('scheduler');
    const answer = await scheduler
      .post(`/api/plans/${story.planId}/edits?dryRun=true`)
      .send({
        edits: [
          {
            op: 'change',
            contactId: contact?.id,
            receive: { fromUtc: '2026-12-03T00:00:00.000Z' },
          },
        ],
      })
      .expect(200);
    expect(rulesOf(answer)).toContain('outside-window');
    expect((await story.read()).version).toBe(plan.version);
  });

  it('refuses bodies, contacts and passes that are none', async () => {
    const nowhere = '00000000-0000-4000-8000-000000000000';
    expect((await edits([])).status).toBe(422);
    expect((await edits([{ op: 'explode' }])).status).toBe(422);
    expect((await edits([{ op: 'remove', contactId: nowhere }])).status).toBe(404);
    expect(
      (await edits([{ op: 'assign', passId: nowhere, receive: { channelId: test.channels.R1 } }]))
        .status,
    ).toBe(404);
    const scheduler = await test.as('scheduler');
    await scheduler.patch(`/api/contacts/${nowhere}`).send({ locked: true }).expect(404);
  });

  it('two people on one contact in the same second: one wins, the other is told', async () => {
    const [contact] = seen((await story.read()).contacts);
    const tag = await story.tag();
    const both = await Promise.all(
      (['scheduler', 'both'] as const).map(async (who) =>
        (await test.as(who))
          .patch(`/api/contacts/${contact?.id}`)
          .set('if-match', tag)
          .send({ note: `by ${who}` }),
      ),
    );
    expect(both.map((one) => one.status).sort()).toEqual([200, 412]);
  });

  it('one-edit forms do the same', async () => {
    const plan = await story.read();
    const contact = seen(plan.contacts)[1];
    if (!contact) throw new Error('no contact');
    const scheduler = await test.as('scheduler');
    const removed = await scheduler
      .delete(`/api/contacts/${contact.id}`)
      .set('if-match', await story.tag())
      .expect(200);
    expect(removed.headers.etag).toBe(await story.tag());
    const made = await scheduler
      .post(`/api/plans/${story.planId}/contacts`)
      .set('if-match', await story.tag())
      .send({ passId: contact.passId, receive: contact.receive, transmit: contact.transmit })
      .expect(201);
    expect(seen((made.body as EditResult).contacts)).toHaveLength(1);
  });
});

describe('the limit of the day', () => {
  it('is stored with the plan, audited, and never goes beyond a hard end', async () => {
    const scheduler = await test.as('scheduler');
    const path = `/api/plans/${story.planId}`;
    await scheduler.patch(path).send({ limitOfDayDb: 3 }).expect(428);
    await scheduler
      .patch(path)
      .set('if-match', await story.tag())
      .send({ limitOfDayDb: 12 })
      .expect(422);
    const answer = await scheduler
      .patch(path)
      .set('if-match', await story.tag())
      .send({ limitOfDayDb: 3 })
      .expect(200);
    expect(answer.body as Plan).toMatchObject({ limitOfDayDb: 3 });
    expect((answer.body as Plan).needsAttention).toMatch(/limit/);
    await scheduler
      .patch(path)
      .set('if-match', await story.tag())
      .send({ limitOfDayDb: 3.6 })
      .expect(200);
    await (await test.as('operator')).patch(path).send({ limitOfDayDb: 3 }).expect(403);
  });
});

describe('reading a plan', () => {
  it('gives facts, open passes and changes', async () => {
    const scheduler = await test.as('scheduler');
    const path = `/api/plans/${story.planId}`;
    const facts = await scheduler.get(`${path}/facts`).expect(200);
    const { windows, busy } = facts.body as { windows: object[]; busy: object[] };
    expect(windows.length).toBeGreaterThan(10);
    expect(busy.length).toBeGreaterThan(8);
    const open = await scheduler.get(`${path}/open-passes`).expect(200);
    const { items } = open.body as { items: OpenPass[] };
    expect(items.map((one) => one.standing)).toContain('unusable');
    for (const one of items.filter(({ standing }) => standing !== 'free'))
      expect(one.reasons[0]?.message).toMatch(/\w{3,}.*\./);
    // What is said to free a pass does it: tried on the plan without changing it.
    const [helped] = items.flatMap((one) => one.wouldFree.filter(({ edits }) => edits.length > 0));
    if (helped) {
      const tried = await scheduler
        .post(`${path}/edits?dryRun=true`)
        .send({ edits: helped.edits })
        .expect(200);
      expect(tried.body).toMatchObject({ violations: [] });
    }
    const changes = await scheduler.get(`${path}/changes`).expect(200);
    expect(changes.body).toMatchObject({ againstRevision: 0, removed: [], changed: [] });
    await scheduler.get(`${path}/changes?against=7`).expect(404);
  });

  it('a lead sees when channels are taken by others, and nothing else of them', async () => {
    const plan = await story.read('lead');
    const hidden = plan.contacts.filter((contact) => 'hidden' in contact);
    const [one] = hidden;
    expect(hidden.length).toBeGreaterThan(2);
    expect(Object.keys(one ?? {}).sort()).toEqual([
      'faceId',
      'hidden',
      'id',
      'receive',
      'transmit',
    ]);
    expect(JSON.stringify(plan)).not.toContain(test.missions.birch);
    expect(JSON.stringify(plan)).not.toContain('Birch');
    const lead = await test.as('lead');
    const open = await lead.get(`/api/plans/${story.planId}/open-passes`).expect(200);
    expect((open.body as { items: object[] }).items.length).toBeGreaterThan(0);
    expect(JSON.stringify(open.body)).not.toContain('Birch');
  });

  it('next contacts of a satellite come soonest first, with what each displaces', async () => {
    const operator = await test.as('operator');
    const path = `/api/satellites/${test.satellites['Birch 1']}/next-contacts?stationId=${test.stationId}`;
    const { body } = await operator.get(`${path}&uplink=true`).expect(200);
    const { items } = body as { items: NextContact[] };
    expect(items.length).toBeGreaterThan(3);
    const begins = items.map((one) => Date.parse(one.fromUtc));
    expect(begins).toEqual([...begins].sort((a, b) => a - b));
    expect(begins[0]).toBeGreaterThan(NOW);
    expect(items.some((one) => one.transmitChannelId !== null)).toBe(true);
    await (await test.as('lead')).get(path).expect(403);
    await operator.get(path.split('?')[0] ?? '').expect(400);
  });
});
