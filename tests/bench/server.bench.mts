/**
 * Issue "From a real file to a released plan": start to the first answer on a migrated database, and 24 satellites
 * over three days predicted in worker threads, beside a plain scan of the same days on one thread.
 */
import { spawn } from 'node:child_process';
import { mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { createServer, type AddressInfo } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import {
  degreesToRadians,
  ecfToLookAngles,
  eciToEcf,
  gstime,
  propagate,
  twoline2satrec,
} from 'satellite.js';
import { ComputePool } from '../../server/jobs/compute-pool.ts';
import { moveEpoch } from '../../server/seeders/write-tle.ts';
import { readElementSets } from '../../shared/orbit/element-reader.ts';
import { DAY_MS } from '../../shared/time.ts';

const folder = mkdtempSync(join(tmpdir(), 'skysheaf-bench-'));
const freePort = (): Promise<number> =>
  new Promise((resolve) => {
    const server = createServer().listen(0, '127.0.0.1', () => {
      const { port } = server.address() as AddressInfo;
      server.close(() => resolve(port));
    });
  });

const startOnce = async (): Promise<number> => {
  const port = await freePort();
  const began = performance.now();
  const child = spawn('node', ['--enable-source-maps', 'dist/server/index.js'], {
    env: {
      ...process.env,
      PORT: String(port),
      DATABASE_FILE: join(folder, 'db.sqlite'),
      SEED_DEMO: 'no',
      LOG_LEVEL: 'error',
    },
    stdio: 'inherit',
  });
  for (;;) {
    const answer = await fetch(`http://127.0.0.1:${port}/api/health`).catch(() => null);
    if (answer?.ok) break;
    await new Promise((done) => setTimeout(done, 10));
  }
  const took = performance.now() - began;
  child.kill('SIGTERM');
  await new Promise((done) => child.once('exit', done));
  return took;
};

await startOnce();
const starts = [await startOnce(), await startOnce(), await startOnce()].sort((a, b) => a - b);
console.log(
  `first HTTP 200 on a migrated database: ${Math.round(starts[1] ?? 0)} ms (median of 3; bar 3000)`,
);

const epochMs = Date.parse('2026-12-01T04:00:00.000Z');
const fromMs = Date.parse('2026-12-01T00:00:00.000Z');
const sets = readElementSets(readFileSync('tle/demo.tle'), 'demo.tle').accepted.map((set) => ({
  ...set,
  ...moveEpoch(set, epochMs),
}));
const observer = { latitudeDeg: 65.1, longitudeDeg: 22.4, heightM: 200, ut1MinusUtcSeconds: 0 };
const pool = new ComputePool();
const predictAll = async () => {
  const found = await Promise.all(
    sets.map(({ line1, line2 }) =>
      pool.run('predictPasses', {
        line1,
        line2,
        observer,
        mask: 5,
        fromMs,
        toMs: fromMs + 3 * DAY_MS,
      }),
    ),
  );
  return {
    passes: found.reduce((sum, one) => sum + one.passes.length, 0),
    calls: found.reduce((sum, one) => sum + one.sgp4Calls, 0),
  };
};
const cold = performance.now();
await predictAll();
const coldMs = performance.now() - cold;
const warm = performance.now();
const { passes, calls } = await predictAll();
const warmMs = performance.now() - warm;
await pool.close();
/** The plain way, with the library's own chain: one look every ten seconds. */
const countByScan = ({ line1, line2 }: { line1: string; line2: string }): number => {
  const satrec = twoline2satrec(line1, line2);
  const place = {
    latitude: degreesToRadians(observer.latitudeDeg),
    longitude: degreesToRadians(observer.longitudeDeg),
    height: observer.heightM / 1000,
  };
  let passes = 0;
  let wasUp = false;
  for (let atMs = fromMs; atMs < fromMs + 3 * DAY_MS; atMs += 10_000) {
    const date = new Date(atMs);
    const state = propagate(satrec, date);
    if (!state) break;
    const look = ecfToLookAngles(place, eciToEcf(state.position, gstime(date)));
    const isUp = look.elevation > degreesToRadians(5);
    if (isUp && !wasUp) passes += 1;
    wasUp = isUp;
  }
  return passes;
};
const scan = performance.now();
const scanned = sets.reduce((sum, set) => sum + countByScan(set), 0);
const scanMs = performance.now() - scan;
console.log(
  `24 satellites x 3 days: ${passes} passes with tracks, ${calls} SGP4 calls, ${Math.round(coldMs)} ms cold (workers start), ${Math.round(warmMs)} ms warm (bar 2000)`,
);
console.log(
  `plain 10 s scan, one thread, no tracks: ${scanned} passes, ${Math.round(scanMs)} ms; ratio to warm ${(scanMs / warmMs).toFixed(1)}`,
);
rmSync(folder, { recursive: true });
