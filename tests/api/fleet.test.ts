import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { UPLINK } from '../support/small-world.ts';
import { startTestApp, type TestApp } from '../support/test-app.ts';

let test: TestApp;
beforeAll(async () => {
  test = await startTestApp();
});
afterAll(() => test.close());

interface Versioned {
  id: string;
  version: number;
}
const tag = ({ id, version }: Versioned): string => `"${id}-v${version}"`;
const bodyOf = <T>(answer: { body: unknown }): T => answer.body as T;

const newSatellite = (over: object = {}) => ({
  name: 'Alder 9',
  catalogNumber: 91090,
  missionId: test.missions.alder,
  downlink: {
    frequencyMhz: 2245,
    bandwidthKhz: 2000,
    polarisation: 'rhcp',
    eirpDbw: 3,
    rateKbps: 1000,
    requiredEbN0Db: 4.5,
  },
  uplink: null,
  ...over,
});

describe('satellites', () => {
  it('are added, read, changed with their tag and deleted', async () => {
    const operator = await test.as('operator');
    const made = await operator.post('/api/satellites').send(newSatellite()).expect(201);
    const satellite = bodyOf<Versioned>(made);
    expect(made.headers.etag).toBe(tag(satellite));
    await operator.patch(`/api/satellites/${satellite.id}`).send({ name: 'Alder 8' }).expect(428);
    await operator
      .patch(`/api/satellites/${satellite.id}`)
      .set('if-match', '"old"')
      .send({ name: 'Alder 8' })
      .expect(412);
    const changed = await operator
      .patch(`/api/satellites/${satellite.id}`)
      .set('if-match', tag(satellite))
      .send({ name: 'Alder 8', uplink: UPLINK })
      .expect(200);
    expect(changed.body).toMatchObject({ name: 'Alder 8', version: 2, uplink: UPLINK });
    await operator
      .delete(`/api/satellites/${satellite.id}`)
      .set('if-match', tag(bodyOf<Versioned>(changed)))
      .expect(204);
    await operator.get(`/api/satellites/${satellite.id}`).expect(404);
  });

  it('refuse a number that is taken, an unknown mission, a wrong value and an unknown member', async () => {
    const operator = await test.as('operator');
    const taken = await operator
      .post('/api/satellites')
      .send(newSatellite({ catalogNumber: 91001 }))
      .expect(409);
    expect(taken.body).toMatchObject({ code: 'catalog-number-taken' });
    await operator
      .post('/api/satellites')
      .send(newSatellite({ missionId: '00000000-0000-4000-8000-000000000000' }))
      .expect(422);
    const wrong = await operator
      .post('/api/satellites')
      .send(newSatellite({ downlink: { ...newSatellite().downlink, bandwidthKhz: -1 } }))
      .expect(422);
    expect(wrong.body).toMatchObject({ errors: [{ pointer: '/downlink/bandwidthKhz' }] });
    await operator
      .post('/api/satellites')
      .send(newSatellite({ colour: 'red' }))
      .expect(422);
  });

  it('are the crew’s to edit', async () => {
    for (const who of ['lead', 'admin'] as const)
      await (await test.as(who)).post('/api/satellites').send(newSatellite()).expect(403);
    await test.anyone().post('/api/satellites').send(newSatellite()).expect(401);
  });

  it('of foreign missions do not exist for a lead', async () => {
    const lead = await test.as('lead');
    const { body } = await lead.get('/api/satellites').expect(200);
    const names = bodyOf<{ items: { name: string }[] }>({ body }).items.map((one) => one.name);
    expect(names).toEqual(['Alder 1', 'Alder 2']);
    await lead.get(`/api/satellites/${test.satellites['Birch 1']}`).expect(404);
  });

  it('that something refers to are not deleted', async () => {
    const operator = await test.as('operator');
    const id = test.satellites['Birch 2'] ?? '';
    const { predictSmallWorld } = await import('../support/test-app.ts');
    await predictSmallWorld(test);
    const seen = bodyOf<Versioned>(await operator.get(`/api/satellites/${id}`).expect(200));
    const refused = await operator
      .delete(`/api/satellites/${id}`)
      .set('if-match', tag(seen))
      .expect(409);
    expect(refused.body).toMatchObject({ code: 'in-use' });
  });
});

describe('missions', () => {
  it('are the administrator’s to add and to delete while nothing refers to them', async () => {
    const admin = await test.as('admin');
    const wish = { name: 'Cedar', code: 'CDR', series: 3, priority: 1, leadIds: [] };
    const made = bodyOf<Versioned>(await admin.post('/api/missions').send(wish).expect(201));
    await admin.post('/api/missions').send(wish).expect(409);
    await (await test.as('scheduler')).post('/api/missions').send(wish).expect(403);
    await admin
      .post('/api/missions')
      .send({ ...wish, name: 'Dogwood', code: 'DGW', leadIds: [test.people.operator.id] })
      .expect(422);
    await admin.delete(`/api/missions/${made.id}`).set('if-match', tag(made)).expect(204);
    const alder = bodyOf<Versioned>(
      await admin.get(`/api/missions/${test.missions.alder}`).expect(200),
    );
    await admin.delete(`/api/missions/${alder.id}`).set('if-match', tag(alder)).expect(409);
  });

  it('let their leads change the name, but not the priority', async () => {
    const lead = await test.as('lead');
    const alder = bodyOf<Versioned>(
      await lead.get(`/api/missions/${test.missions.alder}`).expect(200),
    );
    await lead
      .patch(`/api/missions/${alder.id}`)
      .set('if-match', tag(alder))
      .send({ priority: 1 })
      .expect(403);
    await lead
      .patch(`/api/missions/${alder.id}`)
      .set('if-match', tag(alder))
      .send({ series: 4 })
      .expect(200);
    await lead.get(`/api/missions/${test.missions.birch}`).expect(404);
  });
});

describe('requirement lines and requests', () => {
  const line = (missionId: string, over: object = {}) => ({
    missionId,
    appliesTo: 'each',
    stationId: null,
    what: 'minutes',
    least: 30,
    most: null,
    minimumDurationSeconds: 180,
    uplink: 'none',
    leastUplinkMinutes: null,
    minimumElevationDeg: 10,
    marginFloorDb: null,
    hoursUtc: [6, 18],
    weekdays: null,
    scanLossLimitDb: null,
    ...over,
  });

  it('are their own leads’ to write', async () => {
    const lead = await test.as('lead');
    const made = await lead.post('/api/requirements').send(line(test.missions.alder)).expect(201);
    const row = bodyOf<Versioned>(made);
    await lead.get(`/api/requirements/${row.id}`).expect(200);
    const changed = bodyOf<Versioned>(
      await lead
        .patch(`/api/requirements/${row.id}`)
        .set('if-match', tag(row))
        .send({ least: 40, most: 60 })
        .expect(200),
    );
    await lead
      .patch(`/api/requirements/${row.id}`)
      .set('if-match', tag(changed))
      .send({ most: 20 })
      .expect(422);
    await (await test.as('lead2')).get(`/api/requirements/${row.id}`).expect(404);
    await lead.post('/api/requirements').send(line(test.missions.birch)).expect(404);
    await (
      await test.as('scheduler')
    )
      .post('/api/requirements')
      .send(line(test.missions.alder))
      .expect(403);
    await lead.delete(`/api/requirements/${row.id}`).set('if-match', tag(changed)).expect(204);
    await lead.get(`/api/requirements/${row.id}`).expect(404);
  });

  it('refuse a line that asks nothing', async () => {
    const lead = await test.as('lead');
    await lead
      .post('/api/requirements')
      .send(line(test.missions.alder, { least: null }))
      .expect(422);
  });

  it('a request names an own satellite, is listed and can be withdrawn once', async () => {
    const lead = await test.as('lead');
    const wish = {
      missionId: test.missions.alder,
      satelliteId: test.satellites['Alder 1'],
      kind: 'minutes',
      passId: null,
      minutes: 6,
      uplink: 'none',
      fromUtc: '2026-12-02T00:00:00.000Z',
      toUtc: '2026-12-02T12:00:00.000Z',
      priority: 2,
      reason: 'Camera check-out',
    };
    const made = bodyOf<Versioned>(await lead.post('/api/requests').send(wish).expect(201));
    await lead
      .post('/api/requests')
      .send({ ...wish, satelliteId: test.satellites['Birch 1'] })
      .expect(422);
    await lead
      .post('/api/requests')
      .send({ ...wish, toUtc: wish.fromUtc })
      .expect(422);
    const list = bodyOf<{ items: Versioned[] }>(await lead.get('/api/requests').expect(200));
    expect(list.items.map((one) => one.id)).toContain(made.id);
    const withdrawn = bodyOf<Versioned>(
      await lead
        .patch(`/api/requests/${made.id}`)
        .set('if-match', tag(made))
        .send({ state: 'withdrawn' })
        .expect(200),
    );
    await lead
      .patch(`/api/requests/${made.id}`)
      .set('if-match', tag(withdrawn))
      .send({ state: 'withdrawn' })
      .expect(409);
  });
});

describe('people', () => {
  it('are the administrator’s, with a first password and one administrator left', async () => {
    const admin = await test.as('admin');
    const wish = {
      name: 'New Person',
      email: 'New@test.example',
      roles: ['operator'],
      password: 'long enough to begin with',
    };
    const made = await admin.post('/api/users').send(wish).expect(201);
    expect(made.body).toMatchObject({ email: 'new@test.example', disabled: false });
    expect(JSON.stringify(made.body)).not.toContain('assword');
    await admin.post('/api/users').send(wish).expect(409);
    await admin
      .post('/api/users')
      .send({ ...wish, password: 'short' })
      .expect(422);
    await (await test.as('scheduler')).get('/api/users').expect(403);
    const self = bodyOf<Versioned>(
      await admin.get(`/api/users/${test.people.admin.id}`).expect(200),
    );
    const refused = await admin
      .patch(`/api/users/${self.id}`)
      .set('if-match', tag(self))
      .send({ roles: ['operator'] })
      .expect(409);
    expect(refused.body).toMatchObject({ code: 'last-administrator' });
  });
});

describe('hostile text', () => {
  it('comes back as the text it is', async () => {
    const operator = await test.as('operator');
    const name = '<img src=x onerror=alert(1)>"\';--';
    const made = await operator
      .post('/api/satellites')
      .send(newSatellite({ name, catalogNumber: 91091 }))
      .expect(201);
    expect(made.body).toMatchObject({ name });
    expect(made.headers['content-type']).toContain('application/json');
    expect(made.headers['x-content-type-options']).toBe('nosniff');
  });
});
