import { existsSync } from 'node:fs';
import cookieParser from 'cookie-parser';
import express, { Router, type Express } from 'express';
import helmet from 'helmet';
import { pinoHttp } from 'pino-http';
import { Health } from '../shared/schemas/audit-event.ts';
import { dayOf, toIso } from '../shared/time.ts';
import { reader, type Deps } from './deps.ts';
import { notFound } from './errors.ts';
import { eventRoutes, EventStreams } from './events.routes.ts';
import { Jobs } from './jobs/jobs.ts';
import { requestId } from './middleware/context.ts';
import { errorHandler } from './middleware/error-handler.ts';
import { sameOrigin } from './middleware/origin.ts';
import { findPersonWithExpiry, identify } from './middleware/person.ts';
import { mount, route, type RouteSpec } from './middleware/route.ts';
import { receiveFile } from './middleware/upload.ts';
import { auditRoutes } from './modules/audit/audit.routes.ts';
import { elementSetRoutes } from './modules/element-sets/element-set.routes.ts';
import {
  adoptWaitingSets,
  elementSetsOf,
  setsInUse,
} from './modules/element-sets/element-set.service.ts';
import { exportRoutes } from './modules/exports/export.routes.ts';
import { mailRoutes } from './modules/mail/mail.routes.ts';
import { missionRoutes } from './modules/missions/mission.routes.ts';
import { requirementRoutes } from './modules/missions/requirement.routes.ts';
import { passRoutes } from './modules/passes/pass.routes.ts';
import { predictionSpan, startPrediction } from './modules/passes/prediction.service.ts';
import { PlannedContact } from './modules/plans/contact.entity.ts';
import { closureHitRoutes } from './modules/plans/closure-hits.routes.ts';
import { markBrokenPlans } from './modules/plans/plan-attention.service.ts';
import { planRoutes } from './modules/plans/plan.routes.ts';
import { applyRun } from './modules/plans/plan-runs.service.ts';
import { openPassRoutes } from './modules/plans/open-passes.routes.ts';
import { planWorkRoutes } from './modules/plans/plan-work.routes.ts';
import { Worlds } from './modules/plans/world.ts';
import { windowsOf } from './modules/plans/windows-of.ts';
import { retimePlans } from './modules/plans/retime.service.ts';
import { runRoutes } from './modules/runs/run.routes.ts';
import { missionInUse, ownsSatellite } from './modules/satellites/satellite.service.ts';
import { satelliteRoutes } from './modules/satellites/satellite.routes.ts';
import { sessionRoutes, signInLimit } from './modules/sessions/session.routes.ts';
import { arrayRoutes } from './modules/stations/array.routes.ts';
import { Face } from './modules/stations/face.entity.ts';
import { presentFace } from './modules/stations/station.presenter.ts';
import { stationRoutes } from './modules/stations/station.routes.ts';
import { userRoutes } from './modules/users/user.routes.ts';
import { openApiDocument } from './openapi.ts';

export interface App {
  http: Express;
  routes: RouteSpec[];
  jobs: Jobs;
  worlds: Worlds;
  streams: EventStreams;
}

/** Everything the server can do, without a port. */
export const createApp = (deps: Deps, { clientFolder }: { clientFolder?: string } = {}): App => {
  const jobs = new Jobs(deps);
  const worlds = new Worlds(deps);
  const streams = new EventStreams(deps);
  const routes = allRoutes(deps, { jobs, worlds, streams });
  react(deps, { jobs, worlds });

  const http = express();
  http.disable('x-powered-by');
  http.disable('etag');
  http.set('trust proxy', 'loopback');
  http.set('query parser', 'simple');
  http.use(requestId, requestLog(deps), securityHeaders());
  http.use('/api', apiRouter(deps, routes));
  if (clientFolder && existsSync(clientFolder)) serveClient(http, clientFolder);
  http.use(errorHandler(deps.log));
  return { http, routes, jobs, worlds, streams };
};

interface Parts {
  jobs: Jobs;
  worlds: Worlds;
  streams: EventStreams;
}

const allRoutes = (deps: Deps, { jobs, worlds, streams }: Parts): RouteSpec[] => [
  route({
    method: 'get',
    path: '/health',
    summary: 'Answers 200 when the database is migrated and seeded',
    access: 'public',
    answer: Health,
    handler: () => ({ body: { status: 'ok', serverTimeUtc: toIso(deps.clock.now()) } }),
  }),
  ...sessionRoutes(
    deps,
    async (d, token) => (await findPersonWithExpiry(d, token))?.person ?? null,
  ),
  ...userRoutes(deps),
  ...auditRoutes(deps),
  ...mailRoutes(deps),
  ...runRoutes(deps, jobs, (person, run) => applyRun(deps, worlds, { person, run })),
  ...stationRoutes(deps),
  ...arrayRoutes(deps, channelInUse),
  ...missionRoutes(deps, missionInUse),
  ...requirementRoutes(deps, ownsSatellite),
  ...satelliteRoutes(deps, {
    adopt: adoptWaitingSets,
    setsInUse,
    inUse: async (work, id) => (await elementSetsOf(work.em, id)) > 0,
  }),
  ...elementSetRoutes(deps),
  ...passRoutes(deps, jobs, {
    windowsOf: (passes) => windowsOf(deps, worlds, passes),
    facesOf: async (stationId) =>
      (await reader(deps).find(Face, { station: stationId })).map(presentFace),
  }),
  ...planRoutes(deps, worlds),
  ...openPassRoutes(deps, worlds),
  ...closureHitRoutes(deps, worlds),
  ...planWorkRoutes({ deps, worlds, jobs }),
  ...exportRoutes(deps, worlds),
  ...eventRoutes(streams),
];

const channelInUse: Parameters<typeof arrayRoutes>[1] = async ({ em }, id) =>
  (await em.count(PlannedContact, { $or: [{ receiveChannel: id }, { transmitChannel: id }] })) > 0;

/** What lies to the right in the line of modules reacts to what happened on the left. */
const react = (deps: Deps, { jobs, worlds }: Pick<Parts, 'jobs' | 'worlds'>): void => {
  const say = (error: unknown) => deps.log.error({ err: error }, 'a reaction failed');
  let afterChange: Promise<void> = Promise.resolve();
  /** Contacts follow fresh passes first; then what is still broken is marked. One look after the other. */
  const look = async (isFresh: boolean): Promise<void> => {
    const today = dayOf(deps.clock.now());
    if (isFresh) await retimePlans(deps, worlds, today);
    await markBrokenPlans(deps, worlds, today);
  };
  jobs.alsoWaitFor(() => afterChange);
  deps.bus.subscribe((event) => {
    const span = predictionSpan(deps.clock.now());
    if (event.topic === 'elements') {
      const wish = { stationIds: null, satelliteIds: event.satelliteIds, ...span };
      const named = event.runId ? { ...wish, runId: event.runId } : wish;
      startPrediction(deps, jobs, { person: null, wish: named }).catch(say);
    }
    if (event.topic === 'station' && event.geometry) {
      const wish = { stationIds: [event.id], satelliteIds: null, ...span };
      startPrediction(deps, jobs, { person: null, wish }).catch(say);
    }
    const mayBreak = ['passes', 'fleet', 'station', 'closure'].includes(event.topic);
    if (mayBreak) afterChange = afterChange.then(() => look(event.topic === 'passes')).catch(say);
  });
};

const requestLog = (deps: Deps) =>
  pinoHttp({
    logger: deps.log,
    genReqId: (request) => (request as { requestId?: string }).requestId ?? '',
    redact: ['req.headers.cookie', 'req.headers.authorization', 'res.headers["set-cookie"]'],
    autoLogging: { ignore: (request) => !request.url?.startsWith('/api') },
    customLogLevel: (_request, response, error) =>
      error || response.statusCode >= 500 ? 'error' : 'debug',
  });

const securityHeaders = () =>
  helmet({
    contentSecurityPolicy: {
      useDefaults: false,
      directives: {
        defaultSrc: ["'self'"],
        styleSrc: ["'self'", "'unsafe-inline'"],
        imgSrc: ["'self'", 'data:'],
        objectSrc: ["'none'"],
        baseUri: ["'none'"],
        frameAncestors: ["'none'"],
        formAction: ["'self'"],
      },
    },
    referrerPolicy: { policy: 'same-origin' },
  });

const apiRouter = (deps: Deps, routes: RouteSpec[]): Router => {
  const api = Router();
  api.use((_request, response, next) => {
    response.setHeader('Cache-Control', 'no-store');
    next();
  });
  api.use(sameOrigin(deps.env.PUBLIC_URL), cookieParser());
  api.use(express.json({ limit: '1mb' }));
  api.use(identify(deps));
  api.post('/session', signInLimit());
  api.get('/openapi.json', (_request, response) => {
    response.json(openApiDocument(routes));
  });
  mount(api, routes, receiveFile, deps.env.NODE_ENV !== 'production');
  api.use((request) => {
    throw notFound(`${request.method} ${request.originalUrl.split('?')[0] ?? ''}`);
  });
  return api;
};

/** The built client; every address that is no file is a page of it. */
const serveClient = (http: Express, folder: string): void => {
  http.use('/assets', express.static(`${folder}/assets`, { immutable: true, maxAge: '1y' }));
  http.use('/assets', () => {
    throw notFound('The file');
  });
  http.use(express.static(folder, { index: false, maxAge: 0 }));
  http.get('/{*path}', (_request, response) => {
    response.setHeader('Cache-Control', 'no-cache');
    response.sendFile('index.html', { root: folder });
  });
};
