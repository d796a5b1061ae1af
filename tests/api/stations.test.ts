import { afterAll, beforeAll, describe, expect, it } from 'vitest';
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
const read = async (path: string): Promise<Record<string, unknown> & Versioned> => {
  const agent = await test.as('admin');
  const { body } = await agent.get(path).expect(200);
  return body as Record<string, unknown> & Versioned;
};
const withoutIds = ({
  id: _id,
  version: _v,
  transmitInhibit: _t,
  ...rest
}: Record<string, unknown>) => rest;

describe('stations, faces and channels', () => {
  it('are seen by everybody and edited by the administrator only', async () => {
    const station = await read(`/api/stations/${test.stationId}`);
    for (const who of ['operator', 'scheduler', 'lead'] as const) {
      const agent = await test.as(who);
      await agent.get(`/api/stations/${test.stationId}`).expect(200);
      await agent.get(`/api/faces?stationId=${test.stationId}`).expect(200);
      await agent.get(`/api/channels?stationId=${test.stationId}`).expect(200);
      await agent
        .patch(`/api/stations/${test.stationId}`)
        .set('if-match', tag(station))
        .send({ guardTimeSeconds: 7 })
        .expect(403);
    }
  });

  it('a station is made, changed with its tag, and deleted while it is bare', async () => {
    const admin = await test.as('admin');
    const model = await read(`/api/stations/${test.stationId}`);
    const wish = { ...withoutIds(model), name: 'Second station' };
    const made = (await admin.post('/api/stations').send(wish).expect(201)).body as Versioned;
    await admin.post('/api/stations').send(wish).expect(409);
    await admin
      .post('/api/stations')
      .send({ ...wish, name: 'Third', timeZone: 'Mars/Olympus' })
      .expect(422);
    await admin
      .post('/api/stations')
      .send({
        ...wish,
        name: 'Third',
        horizonMask: [
          { azimuthDeg: 90, elevationDeg: 3 },
          { azimuthDeg: 90, elevationDeg: 5 },
        ],
      })
      .expect(422);
    await admin.patch(`/api/stations/${made.id}`).send({ guardTimeSeconds: 7 }).expect(428);
    await admin
      .patch(`/api/stations/${made.id}`)
      .set('if-match', '"other"')
      .send({ guardTimeSeconds: 7 })
      .expect(412);
    const changed = (
      await admin
        .patch(`/api/stations/${made.id}`)
        .set('if-match', tag(made))
        .send({ guardTimeSeconds: 7 })
        .expect(200)
    ).body as Versioned;
    await admin.delete(`/api/stations/${made.id}`).set('if-match', tag(changed)).expect(204);
    await admin.get(`/api/stations/${made.id}`).expect(404);
    const kept = await read(`/api/stations/${test.stationId}`);
    await admin.delete(`/api/stations/${kept.id}`).set('if-match', tag(kept)).expect(409);
  });

  it('a face refuses values that cannot be, at the field', async () => {
    const admin = await test.as('admin');
    const face = await read(`/api/faces/${test.faceId}`);
    const wrong: [object, string][] = [
      [{ pitchXMm: -5 }, '/pitchXMm'],
      [{ elementsX: 0 }, '/elementsX'],
      [{ receiveTaper: { kind: 'taylor', sidelobeDb: -5, nBar: 4 } }, '/receiveTaper/sidelobeDb'],
      [{ receiveBandMhz: [2290, 2200] }, '/receiveBandMhz'],
      [{ scanLossTable: [[0, 0], [30, 2], [20, 3]] }, '/scanLossTable/2/0'], // prettier-ignore
      [
        { radio: { ...(face.radio as object), radiationEfficiency: 1.2 } },
        '/radio/radiationEfficiency',
      ],
      [{ normalLimitDb: 9 }, '/normalLimitDb'],
    ];
    for (const [change, pointer] of wrong) {
      const refused = await admin
        .patch(`/api/faces/${test.faceId}`)
        .set('if-match', tag(face))
        .send(change)
        .expect(422);
      expect(refused.body).toMatchObject({ errors: [{ pointer }] });
    }
    expect((await read(`/api/faces/${test.faceId}`)).version).toBe(face.version);
    const made = (
      await admin
        .post('/api/faces')
        .send({ ...withoutIds(face), label: 'Another face' })
        .expect(201)
    ).body as Versioned;
    await admin.delete(`/api/faces/${made.id}`).set('if-match', tag(made)).expect(204);
    await admin.delete(`/api/faces/${face.id}`).set('if-match', tag(face)).expect(409);
  });

  it('a channel has a label of its own on its face', async () => {
    const admin = await test.as('admin');
    const channel = await read(`/api/channels/${test.channels.R1}`);
    const wish = { ...withoutIds(channel), label: 'R9' };
    const made = (await admin.post('/api/channels').send(wish).expect(201)).body as Versioned;
    await admin.post('/api/channels').send(wish).expect(409);
    await admin
      .post('/api/channels')
      .send({ ...wish, label: '' })
      .expect(422);
    const changed = (
      await admin
        .patch(`/api/channels/${made.id}`)
        .set('if-match', tag(made))
        .send({ setUpSeconds: 45, inService: false })
        .expect(200)
    ).body as Versioned;
    expect(changed).toMatchObject({ setUpSeconds: 45, inService: false });
    await admin.delete(`/api/channels/${made.id}`).set('if-match', tag(changed)).expect(204);
  });
});

describe('closures', () => {
  const wish = (over: object = {}) => ({
    scope: 'channel',
    scopeId: test.channels.R1,
    direction: 'receive',
    fromUtc: '2026-12-01T12:00:00.000Z',
    toUtc: null,
    reducedByDb: null,
    reason: 'RF chain replaced',
    ...over,
  });

  it('are made by crew and administrator, until further notice or to an end, and ended', async () => {
    const operator = await test.as('operator');
    const made = (await operator.post('/api/closures').send(wish()).expect(201)).body as Versioned;
    expect(made).toMatchObject({ toUtc: null, stationId: test.stationId, inhibit: false });
    await (await test.as('lead')).post('/api/closures').send(wish()).expect(403);
    await operator
      .post('/api/closures')
      .send(wish({ toUtc: '2026-12-01T11:00:00.000Z' }))
      .expect(422);
    await operator
      .post('/api/closures')
      .send(wish({ reason: '' }))
      .expect(422);
    await operator
      .post('/api/closures')
      .send(wish({ scopeId: '00000000-0000-4000-8000-000000000000' }))
      .expect(404);
    const changed = (
      await operator
        .patch(`/api/closures/${made.id}`)
        .set('if-match', tag(made))
        .send({ toUtc: '2026-12-01T15:00:00.000Z' })
        .expect(200)
    ).body as Versioned;
    await operator.delete(`/api/closures/${made.id}`).set('if-match', tag(made)).expect(412);
    await operator.delete(`/api/closures/${made.id}`).set('if-match', tag(changed)).expect(204);
    const ended = await read(`/api/closures/${made.id}`);
    expect(ended.endedUtc).toBe('2026-12-01T09:00:00.000Z');
  });

  it('the transmit inhibit is one call, in force at once, and ended by name', async () => {
    const operator = await test.as('operator');
    const path = `/api/stations/${test.stationId}/transmit-inhibit`;
    await operator.post(path).send({ reason: 'Two people at the array' }).expect(201);
    await operator.post(path).send({ reason: 'And one more' }).expect(409);
    const station = await read(`/api/stations/${test.stationId}`);
    expect(station.transmitInhibit).toMatchObject({
      by: 'Person operator',
      reason: 'Two people at the array',
    });
    await (await test.as('lead')).delete(path).expect(403);
    await (await test.as('scheduler')).delete(path).expect(204);
    await (await test.as('scheduler')).delete(path).expect(409);
    const audit = await (await test.as('admin')).get('/api/audit-events?limit=5').expect(200);
    expect(JSON.stringify(audit.body)).toContain('Transmit inhibit ended by Person scheduler');
  });
});
