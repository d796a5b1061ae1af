import { randomUUID } from 'node:crypto';
import type { EntityManager } from '@mikro-orm/sqlite';
import { DAY_MS, dayStart } from '../../../shared/time.ts';
import { inTransaction, reader, type Deps, type Person, type Work } from '../../deps.ts';
import type { JobContext, Jobs } from '../../jobs/jobs.ts';
import type { PassWithTrack, PredictInput } from '../../workers/compute.worker.ts';
import { ElementSet } from '../element-sets/element-set.entity.ts';
import { Satellite } from '../satellites/satellite.entity.ts';
import { Station } from '../stations/station.entity.ts';
import { Pass, Prediction } from './pass.entity.ts';
import { reconcile } from './reconcile.ts';

/** Kept predicted from one day before now to ten days after (whole UTC days). */
export const predictionSpan = (nowMs: number) => ({
  fromMs: dayStart(nowMs) - DAY_MS,
  toMs: dayStart(nowMs) + 11 * DAY_MS,
});

export interface PredictionWish {
  /** null: all stations. */
  stationIds: string[] | null;
  /** null: all satellites in service. */
  satelliteIds: string[] | null;
  fromMs: number;
  toMs: number;
  runId?: string;
}

interface Piece {
  station: Station;
  satelliteId: string;
  set: ElementSet;
}

const piecesOf = async (em: EntityManager, wish: PredictionWish): Promise<Piece[]> => {
  const stations = await em.find(Station, wish.stationIds ? { id: { $in: wish.stationIds } } : {}, {
    orderBy: { name: 'asc' },
  });
  const satellites = await em.find(Satellite, {
    retired: false,
    ...(wish.satelliteIds && { id: { $in: wish.satelliteIds } }),
  });
  const sets = await em.find(ElementSet, {
    state: 'in-use',
    satellite: { $in: satellites.map((one) => one.id) },
  });
  return stations.flatMap((station) =>
    sets.flatMap((set) => (set.satellite ? [{ station, satelliteId: set.satellite.id, set }] : [])),
  );
};

/** Starts a prediction; returns the run's id at once. */
export const startPrediction = (
  deps: Deps,
  jobs: Jobs,
  { person, wish }: { person: Pick<Person, 'id' | 'name'> | null; wish: PredictionWish },
): Promise<string> =>
  jobs.start(
    {
      ...(wish.runId && { id: wish.runId }),
      kind: 'prediction',
      person,
      input: { ...wish },
    },
    (context) => predict(deps, wish, context),
  );

const predict = async (deps: Deps, wish: PredictionWish, context: JobContext) => {
  const pieces = await piecesOf(reader(deps), wish);
  let passes = 0;
  let sgp4Calls = 0;
  let done = 0;
  const failed: { satelliteId: string; reason: string }[] = [];
  // Two pieces at a time: as many as there are worker threads; the writes stay in order behind the one connection.
  const next = pieces[Symbol.iterator]();
  const lane = async (): Promise<void> => {
    for (const piece of next) {
      context.signal.throwIfAborted();
      const input = searchInput(piece, wish);
      try {
        const found = await deps.pool.run('predictPasses', input, context.signal);
        sgp4Calls += found.sgp4Calls;
        passes += await storePiece(deps, { piece, wish, found: found.passes });
      } catch (error) {
        context.signal.throwIfAborted();
        failed.push({ satelliteId: piece.satelliteId, reason: String(error).slice(0, 300) });
      }
      done += 1;
      context.progress(done / pieces.length, `${done} of ${pieces.length} tracks`);
    }
  };
  await Promise.all([lane(), lane()]);
  await purge(deps);
  deps.bus.emit([{ topic: 'passes', id: context.runId, version: 1 }]);
  return { result: { passes, satellites: pieces.length, sgp4Calls, failed } };
};

const searchInput = ({ station, set }: Piece, wish: PredictionWish): PredictInput => ({
  line1: set.line1,
  line2: set.line2,
  observer: {
    latitudeDeg: station.latitudeDeg,
    longitudeDeg: station.longitudeDeg,
    heightM: station.heightM,
    ut1MinusUtcSeconds: station.ut1MinusUtcSeconds,
  },
  mask: station.horizonMask.map((knot) => [knot.azimuthDeg, knot.elevationDeg]),
  fromMs: wish.fromMs,
  toMs: wish.toMs,
});

const MEAN_MOTION_COLUMNS = [52, 63] as const;
const periodMsOf = (line2: string): number => DAY_MS / Number(line2.slice(...MEAN_MOTION_COLUMNS));

interface Found {
  piece: Piece;
  wish: PredictionWish;
  found: PassWithTrack[];
}

/** Writes the passes of one station and satellite; returns how many there are. */
const storePiece = (deps: Deps, found: Found): Promise<number> =>
  inTransaction(deps, async (work) => {
    const standing = await standingPasses(work.em, found);
    const { takes, left } = reconcile(
      found.found,
      standing.map(({ pass, prediction }) => ({
        passId: pass.id,
        aosMs: prediction.aosMs,
        losMs: prediction.losMs,
        tcaMs: prediction.tcaMs,
      })),
      periodMsOf(found.piece.set.line2),
    );
    for (const [index, predicted] of found.found.entries()) {
      const taken = standing.find(({ pass }) => pass.id === takes[index]);
      if (taken && isSame(taken.prediction, predicted, found.piece)) {
        taken.pass.vanished = false;
        continue;
      }
      addPrediction(work, { piece: found.piece, predicted, pass: taken?.pass ?? null });
    }
    for (const { pass } of standing) if (left.includes(pass.id)) pass.vanished = true;
    await work.em.flush();
    return found.found.length;
  });

const standingPasses = async (em: EntityManager, { piece, wish }: Found) => {
  const passes = await em.find(Pass, {
    station: piece.station.id,
    satellite: piece.satelliteId,
    aosMs: { $gte: Math.floor(wish.fromMs), $lt: Math.ceil(wish.toMs) },
  });
  const predictions = await em.find(Prediction, {
    id: { $in: passes.map((pass) => pass.predictionId) },
  });
  return passes.flatMap((pass) => {
    const prediction = predictions.find((one) => one.id === pass.predictionId);
    return prediction ? [{ pass, prediction }] : [];
  });
};

/** Half a millisecond: a run over the same elements must not add a prediction. */
const SAME_MS = 0.5;
const isSame = (before: Prediction, now: PassWithTrack, { set, station }: Piece): boolean =>
  before.elementSet.id === set.id &&
  before.stationVersion === station.version &&
  Math.abs(before.aosMs - now.aosMs) < SAME_MS &&
  Math.abs(before.losMs - now.losMs) < SAME_MS;

const addPrediction = (
  { em, nowMs }: Work,
  { piece, predicted, pass }: { piece: Piece; predicted: PassWithTrack; pass: Pass | null },
): void => {
  const predictionId = randomUUID();
  const copied = {
    predictionId,
    aosMs: Math.round(predicted.aosMs),
    losMs: Math.round(predicted.losMs),
    maxElevationDeg: predicted.maxElevationDeg,
    vanished: false,
  };
  const owner =
    pass ??
    em.create(Pass, {
      id: randomUUID(),
      station: piece.station.id,
      satellite: piece.satelliteId,
      ...copied,
    });
  Object.assign(owner, copied);
  em.create(Prediction, {
    id: predictionId,
    pass: owner,
    elementSet: piece.set.id,
    stationVersion: piece.station.version,
    aosMs: predicted.aosMs,
    tcaMs: predicted.tcaMs,
    losMs: predicted.losMs,
    startsBefore: predicted.startsBefore,
    endsAfter: predicted.endsAfter,
    maxElevationDeg: predicted.maxElevationDeg,
    aosAzimuthDeg: predicted.aosAzimuthDeg,
    tcaAzimuthDeg: predicted.tcaAzimuthDeg,
    losAzimuthDeg: predicted.losAzimuthDeg,
    tcaRangeKm: predicted.tcaRangeKm,
    track: predicted.track,
    createdMs: nowMs,
  });
};

/** Outside the span, and only what no contact refers to. */
const purge = (deps: Deps): Promise<void> =>
  inTransaction(deps, async ({ em, nowMs }) => {
    const { fromMs } = predictionSpan(nowMs);
    await em.execute(
      `delete from predictions where pass_id in (
         select id from passes where los_ms < ? and id not in (select pass_id from contacts))`,
      [fromMs],
    );
    await em.execute(
      `delete from passes where los_ms < ? and id not in (select pass_id from contacts)`,
      [fromMs],
    );
  });
