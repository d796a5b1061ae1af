import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { PassTrack } from '../../shared/schemas/pass.ts';
import { DAY_MS, HOUR_MS } from '../../shared/time.ts';
import { freshFile, NOW, startTestApp, type TestApp } from '../support/test-app.ts';

let test: TestApp;
beforeAll(async () => {
  test = await startTestApp();
});
afterAll(() => test.close());

type TrackPoint = PassTrack['points'][number];
interface Upload {
  id: string | null;
  accepted: { catalogNumber: number; satelliteId: string; unchanged: boolean }[];
  refused: { line: number; column: number; code: string; reason: string }[];
  unknown: { catalogNumber: number }[];
  runId: string | null;
}
interface Sets {
  items: { id: string; catalogNumber: number; state: string; ageHours: number }[];
}

const upload = async (
  bytes: Buffer | string,
  { query = '', who = 'operator' as const, name = 'morning.tle' } = {},
) =>
  (await test.as(who))
    .post(`/api/element-set-uploads${query}`)
    .attach('file', Buffer.from(bytes), name);
const sets = async (satellite: string): Promise<Sets['items']> => {
  const agent = await test.as('operator');
  const id = test.satellites[satellite];
  return ((await agent.get(`/api/element-sets?satelliteId=${id}`).expect(200)).body as Sets).items;
};

describe('uploading element sets', () => {
  it('previews, stores, predicts, and answers the same bytes with the first upload', async () => {
    const { bytes } = freshFile([91001, 91014, 91020], NOW - 5 * HOUR_MS);
    const preview = await upload(bytes, { query: '?dryRun=true' });
    expect(preview.status).toBe(200);
    expect(preview.body).toMatchObject({ id: null, runId: null });
    expect(await sets('Alder 1')).toEqual([]);

    const first = await upload(bytes);
    expect(first.status).toBe(201);
    const body = first.body as Upload;
    expect(body.accepted.map((one) => one.catalogNumber).sort()).toEqual([91001, 91014]);
    expect(body.unknown.map((one) => one.catalogNumber)).toEqual([91020]);
    expect(body.refused).toEqual([]);
    await test.app.jobs.idle();
    const operator = await test.as('operator');
    const run = await operator.get(`/api/runs/${body.runId ?? ''}`).expect(200);
    expect(run.body).toMatchObject({ state: 'succeeded', progress: 1, kind: 'prediction' });
    const passes = await operator
      .get(`/api/passes?satelliteId=${test.satellites['Alder 1']}&limit=500`)
      .expect(200);
    expect((passes.body as { items: unknown[] }).items.length).toBeGreaterThan(60);

    const again = await upload(bytes);
    expect(again.status).toBe(200);
    expect((again.body as Upload).id).toBe(body.id);
    expect((await sets('Alder 1')).map((one) => one.state)).toEqual(['in-use']);
    const listed = await operator.get('/api/element-set-uploads').expect(200);
    expect((listed.body as { items: unknown[] }).items).toHaveLength(1);
    await operator.get(`/api/element-set-uploads/${body.id ?? ''}`).expect(200);
  });

  it('stores the good sets and reports the bad ones by line, column and reason', async () => {
    const good = freshFile([91002], NOW - 4 * HOUR_MS).bytes.toString();
    const bad = freshFile([91015], NOW - 4 * HOUR_MS).bytes.toString();
    const [name = '', line1 = '', line2 = ''] = bad.split('\n');
    const broken = `${name}\n${line1}\n${line2.slice(0, 68)}${(Number(line2[68]) + 1) % 10}\n`;
    const answer = await upload(good + broken);
    expect(answer.status).toBe(201);
    const body = answer.body as Upload;
    expect(body.accepted.map((one) => one.catalogNumber)).toEqual([91002]);
    expect(body.refused).toHaveLength(1);
    expect(body.refused[0]).toMatchObject({ line: 6, column: 69, code: 'TLE_CHECKSUM' });
    await test.app.jobs.idle();
  });

  it('refuses a file that is none, records the refusal and stores no set', async () => {
    for (const bytes of ['<html>not found</html>', '', 'A\0B']) {
      const answer = await upload(bytes);
      expect(answer.status).toBe(422);
      expect(answer.headers['content-type']).toContain('application/problem+json');
      expect((answer.body as { errors: object[] }).errors[0]).toMatchObject({ line: 1 });
      expect((await upload(bytes)).status).toBe(422);
    }
    const operator = await test.as('operator');
    await operator.post('/api/element-set-uploads').expect(400);
    const big = await upload(Buffer.alloc(3 * 1024 * 1024, 32));
    expect(big.status).toBe(413);
  });

  it('refuses a set that is too old to be propagated', async () => {
    const answer = await upload(freshFile([91002], NOW - 200 * DAY_MS).bytes);
    expect(answer.status).toBe(422);
    expect((answer.body as { code: string }).code).toBe('nothing-usable');
  });

  it('a lead may upload for own satellites only', async () => {
    const { bytes } = freshFile([91001, 91014], NOW - 3 * HOUR_MS);
    const lead = await test.as('lead');
    const answer = await lead.post('/api/element-set-uploads').attach('file', bytes, 'own.tle');
    expect(answer.status).toBe(201);
    const body = answer.body as Upload;
    expect(body.accepted.map((one) => one.catalogNumber)).toEqual([91001]);
    expect(body.refused.map((one) => one.code)).toEqual(['NOT_YOURS']);
    await (
      await test.as('admin')
    )
      .post('/api/element-set-uploads')
      .attach('file', bytes, 'x.tle')
      .expect(403);
    await test.app.jobs.idle();
  });

  it('adopts sets that came before their satellite', async () => {
    const operator = await test.as('operator');
    const made = await operator
      .post('/api/satellites')
      .send({
        name: 'Late one',
        catalogNumber: 91020,
        missionId: test.missions.birch,
        downlink: {
          frequencyMhz: 2230,
          bandwidthKhz: 1000,
          polarisation: 'rhcp',
          eirpDbw: 0,
          rateKbps: 100,
          requiredEbN0Db: 4,
        },
        uplink: null,
      })
      .expect(201);
    const { id } = made.body as { id: string };
    await test.app.jobs.idle();
    const passes = await operator.get(`/api/passes?satelliteId=${id}&limit=5`).expect(200);
    expect((passes.body as { items: unknown[] }).items).toHaveLength(5);
  });
});

describe('using element sets', () => {
  it('a set waits until its time, and a withdrawn one gives way to the one before', async () => {
    const useFrom = new Date(NOW + HOUR_MS).toISOString();
    await upload(freshFile([91002], NOW - HOUR_MS).bytes, { query: `?useFromUtc=${useFrom}` });
    await test.app.jobs.idle();
    const waiting = await sets('Alder 2');
    expect(waiting.map((one) => one.state)).toEqual(['candidate', 'in-use']);

    const { activateCandidates } =
      await import('../../server/modules/element-sets/element-set.service.ts');
    test.clock.set(NOW + 2 * HOUR_MS);
    await activateCandidates(test.deps);
    await test.app.jobs.idle();
    expect((await sets('Alder 2')).map((one) => one.state)).toEqual(['in-use', 'former']);

    const operator = await test.as('operator');
    const [newest] = await sets('Alder 2');
    await operator.post(`/api/element-sets/${newest?.id}/withdraw`).send({}).expect(422);
    await operator
      .post(`/api/element-sets/${newest?.id}/withdraw`)
      .send({ reason: 'wrong object' })
      .expect(200);
    await operator
      .post(`/api/element-sets/${newest?.id}/withdraw`)
      .send({ reason: 'wrong object' })
      .expect(409);
    await test.app.jobs.idle();
    expect((await sets('Alder 2')).map((one) => one.state)).toEqual(['withdrawn', 'in-use']);
    test.clock.set(NOW);
  });

  it('fresh elements take over the passes of the same satellite, one to one', async () => {
    const operator = await test.as('operator');
    const list = async () =>
      (
        (
          await operator
            .get(
              `/api/passes?satelliteId=${test.satellites['Birch 1']}&stationId=${test.stationId}&limit=500`,
            )
            .expect(200)
        ).body as { items: { id: string; elementSetId: string; aosUtc: string }[] }
      ).items;
    const before = await list();
    await upload(freshFile([91014], NOW - 2 * HOUR_MS, -0.5).bytes);
    await test.app.jobs.idle();
    const after = await list();
    expect(after.map((one) => one.id)).toEqual(before.map((one) => one.id));
    expect(after[3]?.elementSetId).not.toBe(before[3]?.elementSetId);
    const shift = Date.parse(after[3]?.aosUtc ?? '') - Date.parse(before[3]?.aosUtc ?? '');
    // Half a degree of mean anomaly at 14.78 revolutions a day is 8.1 s.
    expect(shift / 1000).toBeGreaterThan(7);
    expect(shift / 1000).toBeLessThan(9);
    const track = await operator
      .get(`/api/passes/${after[3]?.id}/track?stepSeconds=60`)
      .expect(200);
    const { points } = track.body as { points: TrackPoint[] };
    const [rising] = points;
    const falling = points.at(-1);
    // Approaching means a higher frequency: 2245 MHz at 7.5 km/s is 56 kHz at the very most.
    expect(rising?.downlinkDopplerHz ?? 0).toBeGreaterThan(10_000);
    expect(falling?.downlinkDopplerHz ?? 0).toBeLessThan(-10_000);
    for (const point of points) {
      expect(Math.abs(point.downlinkDopplerHz)).toBeLessThan(58_000);
      expect(point.downlinkDopplerHz).toBeCloseTo((-2245e6 * point.rangeRateKmS) / 299_792.458, 3);
      const raised = point.apparentElevationDeg - point.elevationDeg;
      expect(raised).toBeGreaterThan(0);
      expect(raised).toBeLessThan(0.3);
    }
  });
});

describe('predicting on demand', () => {
  it('starts, shows progress, and can be cancelled', async () => {
    const scheduler = await test.as('scheduler');
    const wish = {
      stationId: test.stationId,
      fromUtc: '2026-12-01T00:00:00.000Z',
      toUtc: '2026-12-05T00:00:00.000Z',
    };
    const started = await scheduler.post('/api/prediction-runs').send(wish).expect(202);
    const { runId } = started.body as { runId: string };
    await scheduler.post(`/api/runs/${runId}/cancel`).expect(202);
    await test.app.jobs.idle();
    const run = await scheduler.get(`/api/runs/${runId}`).expect(200);
    expect(run.body).toMatchObject({ state: 'cancelled' });
    await scheduler.post(`/api/runs/${runId}/cancel`).expect(409);
    await (await test.as('lead')).post('/api/prediction-runs').send(wish).expect(403);
    await (await test.as('lead')).get(`/api/runs/${runId}`).expect(404);
    await scheduler
      .post('/api/prediction-runs')
      .send({ ...wish, toUtc: wish.fromUtc })
      .expect(422);
    await scheduler
      .post('/api/prediction-runs')
      .send({ ...wish, fromUtc: '2020-01-01T00:00:00.000Z', toUtc: '2020-01-02T00:00:00.000Z' })
      .expect(422);
  });

  it('a second run over the same elements adds no prediction', async () => {
    const count = async () => {
      const [row] = await test.deps.orm.em
        .fork()
        .execute<{ n: number }[]>('select count(*) as n from predictions');
      return row?.n ?? 0;
    };
    const before = await count();
    const scheduler = await test.as('scheduler');
    await scheduler
      .post('/api/prediction-runs')
      .send({
        stationId: test.stationId,
        fromUtc: '2026-12-02T00:00:00.000Z',
        toUtc: '2026-12-04T00:00:00.000Z',
      })
      .expect(202);
    await test.app.jobs.idle();
    expect(await count()).toBe(before);
  });
});
