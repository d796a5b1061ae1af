import type { FaceModel, UsableWindow } from '../../../shared/schedule/model.ts';
import { IdParams } from '../../../shared/schemas/common.ts';
import {
  CreatePredictionRun,
  Pass as PassAnswer,
  PassPage,
  PassQuery,
  PassTrack,
  TrackQuery,
} from '../../../shared/schemas/pass.ts';
import { RunStarted } from '../../../shared/schemas/run.ts';
import { DAY_MS, fromIso } from '../../../shared/time.ts';
import { reader, type Deps } from '../../deps.ts';
import { unprocessable } from '../../errors.ts';
import type { Jobs } from '../../jobs/jobs.ts';
import { route } from '../../middleware/route.ts';
import { getStation } from '../stations/station.service.ts';
import { presentPass, presentTrack } from './pass.presenter.ts';
import { getPass, listPasses, type PassInForce } from './pass.service.ts';
import { predictionSpan, startPrediction } from './prediction.service.ts';

/** Usable windows come from the facts of the days; plans stand to the right and are wired in app.ts. */
export interface PassHooks {
  windowsOf(passes: PassInForce[]): Promise<Map<string, UsableWindow[]>>;
  facesOf(stationId: string): Promise<FaceModel[]>;
}

export const passRoutes = (deps: Deps, jobs: Jobs, hooks: PassHooks) => [
  route({
    method: 'get',
    path: '/passes',
    summary: 'Passes with usable windows, by AOS; a lead sees those of own missions',
    access: 'session',
    action: 'see.plan-side',
    query: PassQuery,
    answer: PassPage,
    handler: async ({ query, person }) => {
      const found = await listPasses(reader(deps), person, query);
      const windows = await hooks.windowsOf(found.items);
      const items = found.items.map((one) => presentPass(one, windows.get(one.pass.id) ?? []));
      return { body: { items, nextCursor: found.nextCursor } };
    },
  }),
  route({
    method: 'get',
    path: '/passes/:id',
    summary: 'One pass with its usable windows',
    access: 'session',
    action: 'see.plan-side',
    params: IdParams,
    answer: PassAnswer,
    handler: async ({ params, person }) => {
      const found = await getPass(reader(deps), person, params.id);
      const windows = await hooks.windowsOf([found]);
      return { body: presentPass(found, windows.get(found.pass.id) ?? []) };
    },
  }),
  route({
    method: 'get',
    path: '/passes/:id/track',
    summary: 'Azimuth, elevation, range, range rate, and scan angle and loss for each face',
    access: 'session',
    action: 'see.plan-side',
    params: IdParams,
    query: TrackQuery,
    answer: PassTrack,
    handler: async ({ params, query, person }) => {
      const found = await getPass(reader(deps), person, params.id);
      const faces = await hooks.facesOf(found.pass.station.id);
      return { body: presentTrack(found, { faces, stepSeconds: query.stepSeconds }) };
    },
  }),
  route({
    method: 'post',
    path: '/prediction-runs',
    summary: 'Predict passes again, in worker threads',
    access: 'session',
    action: 'run.predictions',
    body: CreatePredictionRun,
    answer: RunStarted,
    status: 202,
    handler: async ({ person, body }) => {
      await getStation(reader(deps), body.stationId);
      const span = predictionSpan(deps.clock.now());
      const fromMs = Math.max(span.fromMs, Math.floor(fromIso(body.fromUtc) / DAY_MS) * DAY_MS);
      const toMs = Math.min(span.toMs, Math.ceil(fromIso(body.toUtc) / DAY_MS) * DAY_MS);
      if (fromMs >= toMs)
        throw unprocessable(
          'outside-span',
          'Passes are kept predicted from one day before now to ten days after.',
          [{ pointer: '/fromUtc', detail: 'Ask for days within that span' }],
        );
      const wish = { stationIds: [body.stationId], satelliteIds: null, fromMs, toMs };
      return { body: { runId: await startPrediction(deps, jobs, { person, wish }) } };
    },
  }),
];
