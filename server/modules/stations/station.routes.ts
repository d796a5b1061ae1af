import { z } from 'zod';
import { Id, IdParams, PageQuery, Reason } from '../../../shared/schemas/common.ts';
import { Closure as ClosureAnswer } from '../../../shared/schemas/channel.ts';
import {
  CreateStation,
  PatchStation,
  Station as StationAnswer,
  StationPage,
} from '../../../shared/schemas/station.ts';
import { reader, type Deps } from '../../deps.ts';
import { conflict } from '../../errors.ts';
import { route, type Answer } from '../../middleware/route.ts';
import { tagOf } from '../../middleware/tags.ts';
import { listPage } from '../../paging.ts';
import { beginInhibit, endClosure, inhibitInForce } from './closure.service.ts';
import { Station } from './station.entity.ts';
import { presentClosure, presentStation } from './station.presenter.ts';
import { createStation, deleteStation, getStation, patchStation } from './station.service.ts';

export const StationFilter = PageQuery.extend({ stationId: Id.optional() });

export const stationRoutes = (deps: Deps) => {
  const answer = async (station: Station): Promise<Answer> => ({
    body: presentStation(station, await inhibitInForce(reader(deps), station.id)),
    etag: tagOf(station.id, station.version),
  });
  return [
    route({
      method: 'get',
      path: '/stations',
      summary: 'Stations',
      access: 'session',
      action: 'see.plan-side',
      query: PageQuery,
      answer: StationPage,
      handler: async ({ query }) => {
        const em = reader(deps);
        const found = await listPage<Station>(em, Station, query, { sort: 'name' });
        const items = [];
        for (const station of found.items)
          items.push(presentStation(station, await inhibitInForce(em, station.id)));
        return { body: { items, nextCursor: found.nextCursor } };
      },
    }),
    route({
      method: 'get',
      path: '/stations/:id',
      summary: 'One station',
      access: 'session',
      action: 'see.plan-side',
      params: IdParams,
      answer: StationAnswer,
      handler: async ({ params }) => answer(await getStation(reader(deps), params.id)),
    }),
    route({
      method: 'post',
      path: '/stations',
      summary: 'Add a station',
      access: 'session',
      action: 'edit.stations',
      body: CreateStation,
      answer: StationAnswer,
      status: 201,
      handler: async ({ person, body }) => answer(await createStation(deps, person, body)),
    }),
    route({
      method: 'patch',
      path: '/stations/:id',
      summary: 'Change a station',
      access: 'session',
      action: 'edit.stations',
      params: IdParams,
      body: PatchStation,
      answer: StationAnswer,
      tagged: true,
      handler: async ({ person, params, body, ifMatch }) =>
        answer(await patchStation(deps, person, { id: params.id, wish: body, ifMatch })),
    }),
    route({
      method: 'delete',
      path: '/stations/:id',
      summary: 'Delete a station without faces',
      access: 'session',
      action: 'edit.stations',
      params: IdParams,
      tagged: true,
      handler: async ({ person, params, ifMatch }) => {
        await deleteStation(deps, person, { id: params.id, ifMatch });
        return { status: 204 };
      },
    }),
    route({
      method: 'post',
      path: '/stations/:id/transmit-inhibit',
      summary: 'Transmit inhibit, people at the array: in force at once',
      access: 'session',
      action: 'inhibit.transmit',
      params: IdParams,
      body: z.strictObject({ reason: Reason }),
      answer: ClosureAnswer,
      status: 201,
      handler: async ({ person, params, body }) => ({
        body: presentClosure(
          await beginInhibit(deps, person, { stationId: params.id, reason: body.reason }),
        ),
      }),
    }),
    route({
      method: 'delete',
      path: '/stations/:id/transmit-inhibit',
      summary: 'End the transmit inhibit, by name',
      access: 'session',
      action: 'inhibit.transmit',
      params: IdParams,
      handler: async ({ person, params }) => {
        await getStation(reader(deps), params.id);
        const running = await inhibitInForce(reader(deps), params.id);
        if (!running) throw conflict('no-inhibit', 'No transmit inhibit is in force.');
        await endClosure(deps, person, {
          id: running.id,
          ifMatch: tagOf(running.id, running.version),
        });
        return { status: 204 };
      },
    }),
  ];
};
