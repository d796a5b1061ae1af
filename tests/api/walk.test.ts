import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { RouteSpec } from '../../server/middleware/route.ts';
import { createPlan } from '../../server/modules/plans/plan-create.service.ts';
import { mayEver } from '../../shared/policy.ts';
import type { Who } from '../support/small-world.ts';
import { predictSmallWorld, startTestApp, type TestApp } from '../support/test-app.ts';

let test: TestApp;
let ids: Record<string, string>;

beforeAll(async () => {
  test = await startTestApp();
  await predictSmallWorld(test);
  const plan = await createPlan(test.deps, test.app.worlds, {
    person: test.people.scheduler,
    wish: { stationId: test.stationId, day: '2026-12-02' },
  });
  const operator = await test.as('operator');
  const one = async (path: string): Promise<string> => {
    const { body } = await operator.get(path).expect(200);
    return (body as { items: { id: string }[] }).items[0]?.id ?? '';
  };
  ids = {
    plans: plan.id,
    stations: test.stationId,
    faces: test.faceId,
    channels: test.channels.R1 ?? '',
    missions: test.missions.birch,
    satellites: test.satellites['Birch 1'] ?? '',
    passes: await one(`/api/passes?satelliteId=${test.satellites['Birch 1']}`),
    requirements: await one(`/api/requirements?missionId=${test.missions.birch}`),
    'element-sets': await one(`/api/element-sets?satelliteId=${test.satellites['Birch 1']}`),
    'element-set-uploads': await one('/api/element-set-uploads'),
    users: test.people.operator.id,
  };
}, 60_000);
afterAll(() => test.close());

const NOWHERE = '00000000-0000-4000-8000-000000000000';
const noun = (spec: RouteSpec): string => spec.path.split('/')[1] ?? '';
const addressOf = (spec: RouteSpec, id = ids[noun(spec)] ?? NOWHERE): string =>
  `/api${spec.path.replace(':id', id)}`;
const call = (agent: Awaited<ReturnType<TestApp['as']>>, spec: RouteSpec, address: string) =>
  agent[spec.method](address);
const guarded = (): RouteSpec[] => test.app.routes.filter((spec) => spec.access === 'session');
const STREAM = '/events';

describe('every route', () => {
  it('but the sign-in answers 401 without a session', async () => {
    const open = test.app.routes.filter((spec) => spec.access === 'public');
    expect(open.map((spec) => `${spec.method} ${spec.path}`)).toEqual([
      'get /health',
      'post /session',
      'get /session',
      'delete /session',
    ]);
    for (const spec of guarded()) {
      const answer = await call(test.anyone(), spec, addressOf(spec));
      expect([spec.path, answer.status]).toEqual([spec.path, 401]);
      expect(answer.headers['content-type']).toContain('application/problem+json');
    }
  });

  it('answers 403 to the roles that the policy table leaves out, and never to the others', async () => {
    const wrong: string[] = [];
    for (const who of ['operator', 'scheduler', 'lead', 'admin'] as Who[]) {
      const agent = await test.as(who);
      const person = { ...test.people[who], leadsMissionIds: who === 'lead' ? ['any'] : [] };
      for (const spec of guarded()) {
        if (spec.path === STREAM || !spec.action) continue;
        const { status } = await call(agent, spec, addressOf(spec, NOWHERE));
        const may = mayEver(person, spec.action);
        if ((status === 403) === may) wrong.push(`${who} ${spec.method} ${spec.path}: ${status}`);
        if (status >= 500) wrong.push(`${who} ${spec.method} ${spec.path}: ${status}`);
      }
    }
    expect(wrong).toEqual([]);
  });

  it('answers 400 or 404, never 500, for an id that is none', async () => {
    for (const who of ['operator', 'scheduler', 'lead', 'admin'] as Who[]) {
      const agent = await test.as(who);
      for (const spec of guarded().filter((one) => one.path.includes(':id'))) {
        const { status } = await call(agent, spec, addressOf(spec, 'nope'));
        expect([400, 403]).toContain(status);
      }
    }
  });

  it('names its right, so that the table is whole', () => {
    for (const spec of guarded()) expect([spec.path, spec.action]).not.toContain(undefined);
  });

  it('is described in the document of the API', async () => {
    const { body } = await test.anyone().get('/api/openapi.json').expect(200);
    const { paths } = body as { paths: Record<string, Record<string, object>> };
    for (const spec of test.app.routes) {
      const path = `/api${spec.path.replace(/:(\w+)/g, '{$1}')}`;
      expect(Object.keys(paths[path] ?? {})).toContain(spec.method);
    }
  });
});

describe('a lead', () => {
  it('finds no foreign satellite, mission or pass in anything there is to read', async () => {
    const lead = await test.as('lead');
    const operator = await test.as('operator');
    const passes = await operator
      .get(`/api/passes?missionId=${test.missions.birch}&limit=500`)
      .expect(200);
    const foreign = [
      test.missions.birch,
      test.satellites['Birch 1'] ?? '',
      test.satellites['Birch 2'] ?? '',
      ...(passes.body as { items: { id: string }[] }).items.map((one) => one.id),
    ];
    expect(foreign.length).toBeGreaterThan(20);
    let read = 0;
    for (const spec of guarded().filter((one) => one.method === 'get' && one.path !== STREAM)) {
      const answer = await lead.get(addressOf(spec));
      const text = JSON.stringify(answer.body);
      for (const id of foreign) {
        // An answer of 404 repeats at most the address that was asked for.
        if (answer.status < 400) expect([spec.path, text.includes(id)]).toEqual([spec.path, false]);
      }
      if (answer.status < 400) read += 1;
    }
    expect(read).toBeGreaterThan(12);
  });
});
