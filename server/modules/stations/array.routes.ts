import type { EntityManager } from '@mikro-orm/sqlite';
import {
  Channel as ChannelAnswer,
  ChannelPage,
  Closure as ClosureAnswer,
  ClosurePage,
  CreateChannel,
  CreateClosure,
  PatchChannel,
  PatchClosure,
} from '../../../shared/schemas/channel.ts';
import { IdParams } from '../../../shared/schemas/common.ts';
import {
  CreateFace,
  Face as FaceAnswer,
  FacePage,
  PatchFace,
} from '../../../shared/schemas/face.ts';
import { reader, type Deps } from '../../deps.ts';
import { route, type Answer } from '../../middleware/route.ts';
import { tagOf } from '../../middleware/tags.ts';
import { listPage } from '../../paging.ts';
import { Channel } from './channel.entity.ts';
import { Closure } from './closure.entity.ts';
import { createClosure, endClosure, getClosure, patchClosure } from './closure.service.ts';
import { Face } from './face.entity.ts';
import { presentChannel, presentClosure, presentFace } from './station.presenter.ts';
import { StationFilter } from './station.routes.ts';
import {
  createChannel,
  createFace,
  deleteChannel,
  deleteFace,
  getChannel,
  getFace,
  patchChannel,
  patchFace,
  type InUse,
} from './station.service.ts';

const faceAnswer = (face: Face): Answer => ({
  body: presentFace(face),
  etag: tagOf(face.id, face.version),
});
const channelAnswer = (channel: Channel): Answer => ({
  body: presentChannel(channel),
  etag: tagOf(channel.id, channel.version),
});
const closureAnswer = (closure: Closure): Answer => ({
  body: presentClosure(closure),
  etag: tagOf(closure.id, closure.version),
});

const facesOf = async (em: EntityManager, stationId: string): Promise<string[]> =>
  (await em.find(Face, { station: stationId }, { fields: ['id'] })).map((face) => face.id);

const faceRoutes = (deps: Deps) => [
  route({
    method: 'get',
    path: '/faces',
    summary: 'Array faces',
    access: 'session',
    action: 'see.plan-side',
    query: StationFilter,
    answer: FacePage,
    handler: async ({ query }) => {
      const where = query.stationId ? { station: query.stationId } : {};
      const found = await listPage<Face>(reader(deps), Face, query, { sort: 'label', where });
      return { body: { items: found.items.map(presentFace), nextCursor: found.nextCursor } };
    },
  }),
  route({
    method: 'get',
    path: '/faces/:id',
    summary: 'One face',
    access: 'session',
    action: 'see.plan-side',
    params: IdParams,
    answer: FaceAnswer,
    handler: async ({ params }) => faceAnswer(await getFace(reader(deps), params.id)),
  }),
  route({
    method: 'post',
    path: '/faces',
    summary: 'Add a face',
    access: 'session',
    action: 'edit.faces',
    body: CreateFace,
    answer: FaceAnswer,
    status: 201,
    handler: async ({ person, body }) => faceAnswer(await createFace(deps, person, body)),
  }),
  route({
    method: 'patch',
    path: '/faces/:id',
    summary: 'Change a face',
    access: 'session',
    action: 'edit.faces',
    params: IdParams,
    body: PatchFace,
    answer: FaceAnswer,
    tagged: true,
    handler: async ({ person, params, body, ifMatch }) =>
      faceAnswer(await patchFace(deps, person, { id: params.id, wish: body, ifMatch })),
  }),
  route({
    method: 'delete',
    path: '/faces/:id',
    summary: 'Delete a face without channels',
    access: 'session',
    action: 'edit.faces',
    params: IdParams,
    tagged: true,
    handler: async ({ person, params, ifMatch }) => {
      await deleteFace(deps, person, { id: params.id, ifMatch });
      return { status: 204 };
    },
  }),
];

const channelRoutes = (deps: Deps, inUse: InUse) => [
  route({
    method: 'get',
    path: '/channels',
    summary: 'Beam channels',
    access: 'session',
    action: 'see.plan-side',
    query: StationFilter,
    answer: ChannelPage,
    handler: async ({ query }) => {
      const em = reader(deps);
      const where = query.stationId ? { face: { $in: await facesOf(em, query.stationId) } } : {};
      const found = await listPage<Channel>(em, Channel, query, { sort: 'label', where });
      return { body: { items: found.items.map(presentChannel), nextCursor: found.nextCursor } };
    },
  }),
  route({
    method: 'get',
    path: '/channels/:id',
    summary: 'One channel',
    access: 'session',
    action: 'see.plan-side',
    params: IdParams,
    answer: ChannelAnswer,
    handler: async ({ params }) => channelAnswer(await getChannel(reader(deps), params.id)),
  }),
  route({
    method: 'post',
    path: '/channels',
    summary: 'Add a channel',
    access: 'session',
    action: 'edit.channels',
    body: CreateChannel,
    answer: ChannelAnswer,
    status: 201,
    handler: async ({ person, body }) => channelAnswer(await createChannel(deps, person, body)),
  }),
  route({
    method: 'patch',
    path: '/channels/:id',
    summary: 'Change a channel',
    access: 'session',
    action: 'edit.channels',
    params: IdParams,
    body: PatchChannel,
    answer: ChannelAnswer,
    tagged: true,
    handler: async ({ person, params, body, ifMatch }) =>
      channelAnswer(await patchChannel(deps, person, { id: params.id, wish: body, ifMatch })),
  }),
  route({
    method: 'delete',
    path: '/channels/:id',
    summary: 'Delete a channel that no contact refers to',
    access: 'session',
    action: 'edit.channels',
    params: IdParams,
    tagged: true,
    handler: async ({ person, params, ifMatch }) => {
      await deleteChannel(deps, person, { id: params.id, ifMatch, inUse });
      return { status: 204 };
    },
  }),
];

const closureRoutes = (deps: Deps) => [
  route({
    method: 'get',
    path: '/closures',
    summary: 'Closures, latest beginning first',
    access: 'session',
    action: 'see.plan-side',
    query: StationFilter,
    answer: ClosurePage,
    handler: async ({ query }) => {
      const where = query.stationId ? { station: query.stationId } : {};
      const found = await listPage<Closure>(reader(deps), Closure, query, {
        sort: 'fromMs',
        descending: true,
        where,
      });
      return { body: { items: found.items.map(presentClosure), nextCursor: found.nextCursor } };
    },
  }),
  route({
    method: 'get',
    path: '/closures/:id',
    summary: 'One closure',
    access: 'session',
    action: 'see.plan-side',
    params: IdParams,
    answer: ClosureAnswer,
    handler: async ({ params }) => closureAnswer(await getClosure(reader(deps), params.id)),
  }),
  route({
    method: 'post',
    path: '/closures',
    summary: 'Close a station, face or channel for a direction; always accepted',
    access: 'session',
    action: 'edit.closures',
    body: CreateClosure,
    answer: ClosureAnswer,
    status: 201,
    handler: async ({ person, body }) => closureAnswer(await createClosure(deps, person, body)),
  }),
  route({
    method: 'patch',
    path: '/closures/:id',
    summary: 'Change times or reason',
    access: 'session',
    action: 'edit.closures',
    params: IdParams,
    body: PatchClosure,
    answer: ClosureAnswer,
    tagged: true,
    handler: async ({ person, params, body, ifMatch }) =>
      closureAnswer(await patchClosure(deps, person, { id: params.id, wish: body, ifMatch })),
  }),
  route({
    method: 'delete',
    path: '/closures/:id',
    summary: 'End a closure now',
    access: 'session',
    action: 'edit.closures',
    params: IdParams,
    tagged: true,
    handler: async ({ person, params, ifMatch }) => {
      await endClosure(deps, person, { id: params.id, ifMatch });
      return { status: 204 };
    },
  }),
];

export const arrayRoutes = (deps: Deps, channelInUse: InUse) => [
  ...faceRoutes(deps),
  ...channelRoutes(deps, channelInUse),
  ...closureRoutes(deps),
];
