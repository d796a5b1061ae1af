import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { predictSmallWorld, startTestApp, type TestApp } from '../support/test-app.ts';

let test: TestApp;
beforeAll(async () => {
  test = await startTestApp();
  await predictSmallWorld(test);
}, 60_000);
afterAll(() => test.close());

const execute = (sql: string) => test.deps.orm.em.getConnection().execute<object[]>(sql);
const count = async (table: string): Promise<number> =>
  Number(Object.values((await execute(`select count(*) from ${table}`))[0] ?? {})[0]);

describe('a full disk', () => {
  it('is a clear error, nothing is half-written, and it works again when there is room', async () => {
    const operator = await test.as('operator');
    const before = [await count('satellites'), await count('audit_events')];
    const [row] = await execute('pragma page_count');
    const pages = Number(Object.values(row ?? {})[0]);
    // SQLite itself says SQLITE_FULL when it may not grow: the same code as on a full disk.
    await execute(`pragma max_page_count = ${pages}`);
    const wish = (index: number) => ({
      name: `Filler ${index} ${'x'.repeat(60)}`,
      catalogNumber: 92000 + index,
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
    });
    let stored = 0;
    let refused: { status: number; body: unknown; headers: Record<string, string> } | null = null;
    for (let index = 0; index < 400 && !refused; index++) {
      const answer = await operator.post('/api/satellites').send(wish(index));
      if (answer.status === 201) stored += 1;
      else refused = answer;
    }
    expect(refused?.status).toBe(503);
    expect(refused?.body).toMatchObject({ code: 'storage-unavailable' });
    expect(refused?.headers['retry-after']).toBeDefined();
    // Each satellite comes with its audit entry, or neither does.
    expect([await count('satellites'), await count('audit_events')]).toEqual(
      before.map((rows) => rows + stored),
    );
    await execute('pragma max_page_count = 1000000');
    await operator.post('/api/satellites').send(wish(399)).expect(201);
  });
});
