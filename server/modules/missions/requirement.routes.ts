import type { EntityManager } from '@mikro-orm/sqlite';
import { Id, IdParams, PageQuery } from '../../../shared/schemas/common.ts';
import {
  CreateRequest,
  CreateRequirement,
  PatchRequest,
  PatchRequirement,
  Request as RequestAnswer,
  RequestPage,
  Requirement,
  RequirementPage,
} from '../../../shared/schemas/requirement.ts';
import { toIso } from '../../../shared/time.ts';
import { reader, type Deps } from '../../deps.ts';
import { route, type Answer } from '../../middleware/route.ts';
import { tagOf } from '../../middleware/tags.ts';
import type { RequestRow, RequirementRow } from './requirement.entity.ts';
import {
  createRequest,
  createRequirement,
  deleteRequirement,
  getRequirement,
  listRequests,
  listRequirements,
  patchRequirement,
  withdrawRequest,
} from './requirement.service.ts';

const MissionFilterQuery = PageQuery.extend({ missionId: Id.optional() });

export const presentRequirement = (row: RequirementRow): Requirement => ({
  id: row.id,
  version: row.version,
  missionId: row.mission.id,
  appliesTo: row.appliesTo,
  stationId: row.stationId ?? null,
  what: row.what,
  least: row.least ?? null,
  most: row.most ?? null,
  minimumDurationSeconds: row.minimumDurationSeconds,
  uplink: row.uplink,
  leastUplinkMinutes: row.leastUplinkMinutes ?? null,
  minimumElevationDeg: row.minimumElevationDeg ?? null,
  marginFloorDb: row.marginFloorDb ?? null,
  hoursUtc: row.hoursUtc ?? null,
  weekdays: row.weekdays ?? null,
  scanLossLimitDb: row.scanLossLimitDb ?? null,
});
const answerRequirement = (row: RequirementRow): Answer => ({
  body: presentRequirement(row),
  etag: tagOf(row.id, row.version),
});

const presentRequest = (row: RequestRow): RequestAnswer => ({
  id: row.id,
  version: row.version,
  missionId: row.mission.id,
  satelliteId: row.satelliteId,
  kind: row.kind,
  passId: row.passId ?? null,
  minutes: row.minutes ?? null,
  uplink: row.uplink,
  fromUtc: toIso(row.fromMs),
  toUtc: toIso(row.toMs),
  priority: row.priority,
  reason: row.reason,
  state: row.state,
});
const answerRequest = (row: RequestRow): Answer => ({
  body: presentRequest(row),
  etag: tagOf(row.id, row.version),
});

export type OwnsSatellite = (
  em: EntityManager,
  satelliteId: string,
  missionId: string,
) => Promise<boolean>;

export const requirementRoutes = (deps: Deps, ownsSatellite: OwnsSatellite) => [
  route({
    method: 'get',
    path: '/requirements',
    summary: 'Requirement lines; a lead sees those of own missions',
    access: 'session',
    action: 'see.plan-side',
    query: MissionFilterQuery,
    answer: RequirementPage,
    handler: async ({ query, person }) => {
      const found = await listRequirements(reader(deps), person, query);
      return {
        body: { items: found.items.map(presentRequirement), nextCursor: found.nextCursor },
      };
    },
  }),
  route({
    method: 'get',
    path: '/requirements/:id',
    summary: 'One requirement line',
    access: 'session',
    action: 'see.plan-side',
    params: IdParams,
    answer: Requirement,
    handler: async ({ params, person }) =>
      answerRequirement(await getRequirement(reader(deps), person, params.id)),
  }),
  route({
    method: 'post',
    path: '/requirements',
    summary: 'Add a requirement line',
    access: 'session',
    action: 'edit.requirements',
    body: CreateRequirement,
    answer: Requirement,
    status: 201,
    handler: async ({ person, body }) =>
      answerRequirement(await createRequirement(deps, person, body)),
  }),
  route({
    method: 'patch',
    path: '/requirements/:id',
    summary: 'Change a requirement line',
    access: 'session',
    action: 'edit.requirements',
    params: IdParams,
    body: PatchRequirement,
    answer: Requirement,
    tagged: true,
    handler: async ({ person, params, body, ifMatch }) =>
      answerRequirement(
        await patchRequirement(deps, person, { id: params.id, wish: body, ifMatch }),
      ),
  }),
  route({
    method: 'delete',
    path: '/requirements/:id',
    summary: 'Delete a requirement line',
    access: 'session',
    action: 'edit.requirements',
    params: IdParams,
    tagged: true,
    handler: async ({ person, params, ifMatch }) => {
      await deleteRequirement(deps, person, { id: params.id, ifMatch });
      return { status: 204 };
    },
  }),
  route({
    method: 'get',
    path: '/requests',
    summary: 'One-off requests; a lead sees those of own missions',
    access: 'session',
    action: 'see.plan-side',
    query: MissionFilterQuery,
    answer: RequestPage,
    handler: async ({ query, person }) => {
      const found = await listRequests(reader(deps), person, query);
      return { body: { items: found.items.map(presentRequest), nextCursor: found.nextCursor } };
    },
  }),
  route({
    method: 'post',
    path: '/requests',
    summary: 'Ask for something once',
    access: 'session',
    action: 'edit.requests',
    body: CreateRequest,
    answer: RequestAnswer,
    status: 201,
    handler: async ({ person, body }) =>
      answerRequest(await createRequest(deps, person, body, ownsSatellite)),
  }),
  route({
    method: 'patch',
    path: '/requests/:id',
    summary: 'Withdraw a request',
    access: 'session',
    action: 'edit.requests',
    params: IdParams,
    body: PatchRequest,
    answer: RequestAnswer,
    tagged: true,
    handler: async ({ person, params, ifMatch }) =>
      answerRequest(await withdrawRequest(deps, person, { id: params.id, ifMatch })),
  }),
];
