/**
 * The pass search beside a naive scan, both in this process and interleaved: 1,000 invented sets of 13 kinds of orbit,
 * station 48 N, mask 5 deg. CPU times (user and system), because wall times on a shared machine say little.
 * `PROOF=1 npm run bench -- pass-search` adds brute force over all sets, three stations and four masks (20 minutes);
 * `PROOF=8` takes every eighth set.
 */
import { isMainThread, parentPort, Worker, workerData } from 'node:worker_threads';
import {
  degreesToRadians,
  ecfToLookAngles,
  eciToEcf,
  gstime,
  propagate,
  twoline2satrec,
} from 'satellite.js';
import { makeTrack } from '../../shared/orbit/make-track.ts';
import { horizonFrame } from '../../shared/orbit/observer.ts';
import { searchPasses } from '../../shared/orbit/pass-search.ts';
import { predictBatch } from '../../shared/orbit/predict-batch.ts';
import { makeOrbit, propagate as sgp4At } from '../../shared/orbit/propagation.ts';
import { toHorizon } from '../../shared/orbit/topocentric.ts';
import { directionAt, lookAnglesAt, lookAnglesOf } from '../../shared/orbit/track.ts';
import { DAY_MS } from '../../shared/time.ts';
import { denseLooks, densePasses } from '../accuracy/dense-scan.ts';
import { allSets, PROOF_MASKS, PROOF_STATIONS, type NamedSet } from '../accuracy/mixed-sets.ts';

const FROM_MS = Date.UTC(2026, 11, 1);
const OBSERVER = { latitudeDeg: 48, longitudeDeg: 11.3, heightM: 560 };
const MASK_DEG = 5;
const NAIVE_STEP_MS = 10_000;
/** The naive scan takes every tenth set, all kinds among them; its time is scaled up. */
const NAIVE_SHARE = 10;
const ROUNDS = 9;

const sets = isMainThread ? allSets() : [];

const cpuSeconds = (work: () => void): number => {
  const before = process.cpuUsage();
  work();
  const { user, system } = process.cpuUsage(before);
  return (user + system) / 1e6;
};

const median = (values: number[]): number =>
  [...values].sort((a, b) => a - b)[values.length >> 1] ?? NaN;

interface Tally {
  passes: number;
  calls: number;
  violations: number;
}

const searchAll = (chosen: readonly NamedSet[], days: number): Tally => {
  const tally: Tally = { passes: 0, calls: 0, violations: 0 };
  for (const elements of chosen) {
    const toMs = FROM_MS + days * DAY_MS;
    const query = { elements, observer: OBSERVER, mask: MASK_DEG, fromMs: FROM_MS, toMs };
    const found = searchPasses(query);
    tally.passes += found.passes.length;
    tally.calls += found.sgp4Calls;
    tally.violations += found.guardViolations;
  }
  return tally;
};

/** What one writes first: propagate by Date every ten seconds, turn, look. */
const naiveScan = (chosen: readonly NamedSet[]): number => {
  const station = {
    latitude: degreesToRadians(OBSERVER.latitudeDeg),
    longitude: degreesToRadians(OBSERVER.longitudeDeg),
    height: OBSERVER.heightM / 1000,
  };
  let passes = 0;
  for (const { line1, line2 } of chosen) {
    const satrec = twoline2satrec(line1, line2);
    let wasAbove = false;
    for (let ms = FROM_MS; ms <= FROM_MS + DAY_MS; ms += NAIVE_STEP_MS) {
      const date = new Date(ms);
      const state = propagate(satrec, date);
      if (!state) break;
      const { elevation } = ecfToLookAngles(station, eciToEcf(state.position, gstime(date)));
      const isAbove = elevation >= degreesToRadians(MASK_DEG);
      if (isAbove && !wasAbove) passes += 1;
      wasAbove = isAbove;
    }
  }
  return passes;
};

const compareWithNaive = (): void => {
  const few = sets.filter((_, index) => index % NAIVE_SHARE === 0);
  const [own, naive]: [number[], number[]] = [[], []];
  let tally: Tally = { passes: 0, calls: 0, violations: 0 };
  for (let round = 0; round < ROUNDS; round++) {
    own.push(cpuSeconds(() => (tally = searchAll(sets, 1))));
    naive.push(cpuSeconds(() => naiveScan(few)) * NAIVE_SHARE);
  }
  const naiveCalls = DAY_MS / NAIVE_STEP_MS + 1;
  const { passes, calls, violations } = tally;
  const perDay = calls / sets.length;
  console.log(`passes in 1,000 satellite-days: ${passes}, guard violations: ${violations}`);
  console.log(
    `SGP4 calls: ${perDay.toFixed(1)} a satellite-day, ${(calls / passes).toFixed(1)} a pass; 10 s scan ${naiveCalls}: ${(naiveCalls / perDay).toFixed(0)} times fewer`,
  );
  const warm = own.slice(3).map((seconds, index) => (naive[index + 3] ?? NaN) / seconds);
  console.log(
    `CPU for 1,000 satellite-days: cold ${own[0]?.toFixed(2)} s, warm ${median(own.slice(3)).toFixed(3)} s; 10 s scan ${median(naive.slice(3)).toFixed(2)} s: ${median(warm).toFixed(0)} times less warm (${Math.min(...warm).toFixed(0)} to ${Math.max(...warm).toFixed(0)}), ${((naive[0] ?? NaN) / (own[0] ?? NaN)).toFixed(0)} cold`,
  );
};

const showLinearity = (): void => {
  const line = (name: string, sizes: number[], cost: (size: number) => [number, number]): void => {
    const shown = sizes.map((size) => {
      const rounds = [1, 2, 3].map(() => cost(size));
      const microseconds = median(rounds.map(([seconds]) => seconds)) * 1e6;
      const [, satelliteDays] = rounds[0] ?? [0, 1];
      return `${size}: ${(microseconds / satelliteDays).toFixed(0)}`;
    });
    console.log(`CPU us a satellite-day by ${name}: ${shown.join(', ')}`);
  };
  // Every n-th set, so that each number has the same kinds of orbit.
  line('satellites (1 day)', [125, 250, 500, 1000], (count) => {
    const chosen = sets.filter((_, index) => index % (sets.length / count) === 0);
    return [cpuSeconds(() => searchAll(chosen, 1)), count];
  });
  line('days (500 satellites)', [1, 2, 4, 8, 16], (days) => {
    const chosen = sets.filter((_, index) => index % 2 === 0);
    return [cpuSeconds(() => searchAll(chosen, days)), chosen.length * days];
  });
};

interface Share {
  sets: NamedSet[];
  days: number;
  withTracks: boolean;
}

const workThrough = ({ sets: share, days, withTracks }: Share): Tally => {
  if (!withTracks) return searchAll(share, days);
  const tally: Tally = { passes: 0, calls: 0, violations: 0 };
  const satellites = share.map((elements) => ({ id: elements.name, elements }));
  const toMs = FROM_MS + days * DAY_MS;
  const query = { observer: OBSERVER, mask: MASK_DEG, fromMs: FROM_MS, toMs };
  for (const item of predictBatch(satellites, query)) {
    if (!('prediction' in item)) continue;
    tally.passes += item.prediction.passes.length;
    tally.calls += item.prediction.sgp4Calls;
    tally.violations += item.prediction.guardViolations;
  }
  return tally;
};

/** A worker does not inherit the loader of TypeScript. */
const ENTRY = `import('tsx/esm/api').then(({ register }) => { register(); return import('${import.meta.url}'); });`;

/** Wall time from the start of the workers to the last answer, their loading included. */
const inWorkers = async (workers: number, withTracks: boolean): Promise<void> => {
  const days = 7;
  const [began, cpuBefore] = [performance.now(), process.cpuUsage()];
  const tallies = await Promise.all(
    Array.from({ length: workers }, (_, worker) => {
      const share: Share = {
        sets: sets.filter((_set, index) => index % workers === worker),
        days,
        withTracks,
      };
      return new Promise<Tally>((resolve, reject) => {
        new Worker(ENTRY, { eval: true, workerData: share })
          .once('message', resolve)
          .once('error', reject);
      });
    }),
  );
  const seconds = (performance.now() - began) / 1000;
  const { user, system } = process.cpuUsage(cpuBefore);
  const passes = tallies.reduce((sum, tally) => sum + tally.passes, 0);
  const what = withTracks ? 'passes with tracks' : 'passes';
  console.log(
    `1,000 satellites x ${days} days in ${workers} worker threads: ${seconds.toFixed(2)} s (${((user + system) / 1e6).toFixed(2)} s of CPU) for ${passes} ${what}`,
  );
};

const showTracks = (): void => {
  const elements = sets[0];
  if (!elements) return;
  const pass = searchPasses({
    elements,
    observer: OBSERVER,
    mask: MASK_DEG,
    fromMs: FROM_MS,
    toMs: FROM_MS + DAY_MS,
  }).passes[0];
  if (!pass) return;
  const track = makeTrack(elements, OBSERVER, pass.aosMs, pass.losMs);
  const [orbit, frame] = [makeOrbit(elements), horizonFrame(OBSERVER)];
  const count = 500_000;
  const perPoint = (look: (ms: number) => unknown): number => {
    const rounds = [1, 2, 3, 4, 5].map(() =>
      cpuSeconds(() => {
        for (let i = 0; i < count; i++) look(pass.aosMs + ((pass.losMs - pass.aosMs) * i) / count);
      }),
    );
    return (median(rounds) / count) * 1e9;
  };
  const chain = (ms: number): unknown => {
    const teme = sgp4At(orbit, ms);
    return teme && lookAnglesOf(toHorizon(teme, frame, ms));
  };
  const [direct, direction, look] = [
    perPoint(chain),
    perPoint((ms) => directionAt(track, ms)),
    perPoint((ms) => lookAnglesAt(track, ms)),
  ];
  console.log(
    `a track point: direction ${direction.toFixed(0)} ns, look angles ${look.toFixed(0)} ns; the full chain ${direct.toFixed(0)} ns, ${(direct / direction).toFixed(0)} and ${(direct / look).toFixed(0)} times more`,
  );
};

const prove = (every: number): void => {
  let [agreed, missed, extra, worstMs] = [0, 0, 0, 0];
  for (const elements of sets.filter((_, index) => index % every === 0)) {
    const scan = denseLooks(elements, PROOF_STATIONS, FROM_MS, FROM_MS + DAY_MS);
    for (const [station, observer] of PROOF_STATIONS.entries())
      for (const mask of PROOF_MASKS) {
        const want = densePasses(scan, station, mask);
        const toMs = FROM_MS + DAY_MS;
        const got = searchPasses({ elements, observer, mask, fromMs: FROM_MS, toMs }).passes;
        for (const pass of want) {
          const isSame = (other: { aosMs: number; losMs: number }): boolean =>
            other.aosMs < pass.losMs + 1000 && other.losMs > pass.aosMs - 1000;
          const index = got.findIndex(isSame);
          const [twin] = index < 0 ? [] : got.splice(index, 1);
          if (!twin) {
            missed += 1;
            console.log('missed', elements.name, station, pass);
            continue;
          }
          agreed += 1;
          const off = Math.max(
            Math.abs(twin.aosMs - pass.aosMs),
            Math.abs(twin.losMs - pass.losMs),
          );
          worstMs = Math.max(worstMs, off);
        }
        extra += got.length;
        for (const pass of got) console.log('extra', elements.name, station, pass);
      }
  }
  console.log(
    `brute force: ${agreed} passes agree, ${missed} missed, ${extra} extra, AOS/LOS within ${worstMs.toFixed(2)} ms`,
  );
};

if (isMainThread) {
  compareWithNaive();
  showLinearity();
  showTracks();
  await inWorkers(2, false);
  await inWorkers(2, true);
  const proof = Number(process.env.PROOF ?? 0);
  if (proof > 0) prove(proof);
} else parentPort?.postMessage(workThrough(workerData as Share));
