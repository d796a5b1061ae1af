import type { EntityManager } from '@mikro-orm/sqlite';
import { Id, IdParams, PageQuery } from '../../../shared/schemas/common.ts';
import {
  CreateSatellite,
  PatchSatellite,
  Satellite as SatelliteAnswer,
  SatellitePage,
} from '../../../shared/schemas/satellite.ts';
import { reader, type Deps, type Work } from '../../deps.ts';
import { route, type Answer } from '../../middleware/route.ts';
import { tagOf } from '../../middleware/tags.ts';
import type { Satellite } from './satellite.entity.ts';
import { presentSatellite, type InUse } from './satellite.presenter.ts';
import {
  createSatellite,
  deleteSatellite,
  getSatellite,
  listSatellites,
  patchSatellite,
  type Adopt,
} from './satellite.service.ts';

/** What stands to the right in the line of modules and is wired in app.ts. */
export interface SatelliteHooks {
  adopt: Adopt;
  setsInUse(em: EntityManager, satelliteIds: string[]): Promise<Map<string, InUse>>;
  inUse(work: Work, satelliteId: string): Promise<boolean>;
}

export const satelliteRoutes = (deps: Deps, hooks: SatelliteHooks) => {
  const answer = async (satellite: Satellite): Promise<Answer> => {
    const sets = await hooks.setsInUse(reader(deps), [satellite.id]);
    return {
      body: presentSatellite(satellite, sets.get(satellite.id) ?? null),
      etag: tagOf(satellite.id, satellite.version),
    };
  };
  return [
    route({
      method: 'get',
      path: '/satellites',
      summary: 'Satellites; a lead sees those of own missions',
      access: 'session',
      action: 'see.plan-side',
      query: PageQuery.extend({ missionId: Id.optional() }),
      answer: SatellitePage,
      handler: async ({ query, person }) => {
        const em = reader(deps);
        const found = await listSatellites(em, person, query);
        const sets = await hooks.setsInUse(
          em,
          found.items.map((satellite) => satellite.id),
        );
        const items = found.items.map((one) => presentSatellite(one, sets.get(one.id) ?? null));
        return { body: { items, nextCursor: found.nextCursor } };
      },
    }),
    route({
      method: 'get',
      path: '/satellites/:id',
      summary: 'One satellite',
      access: 'session',
      action: 'see.plan-side',
      params: IdParams,
      answer: SatelliteAnswer,
      handler: async ({ params, person }) =>
        answer(await getSatellite(reader(deps), person, params.id)),
    }),
    route({
      method: 'post',
      path: '/satellites',
      summary: 'Add a satellite',
      access: 'session',
      action: 'edit.satellites',
      body: CreateSatellite,
      answer: SatelliteAnswer,
      status: 201,
      handler: async ({ person, body }) =>
        answer(await createSatellite(deps, person, { wish: body, adopt: hooks.adopt })),
    }),
    route({
      method: 'patch',
      path: '/satellites/:id',
      summary: 'Change a satellite',
      access: 'session',
      action: 'edit.satellites',
      params: IdParams,
      body: PatchSatellite,
      answer: SatelliteAnswer,
      tagged: true,
      handler: async ({ person, params, body, ifMatch }) =>
        answer(
          await patchSatellite(deps, person, {
            id: params.id,
            wish: body,
            ifMatch,
            adopt: hooks.adopt,
          }),
        ),
    }),
    route({
      method: 'delete',
      path: '/satellites/:id',
      summary: 'Delete a satellite that nothing refers to',
      access: 'session',
      action: 'edit.satellites',
      params: IdParams,
      tagged: true,
      handler: async ({ person, params, ifMatch }) => {
        await deleteSatellite(deps, person, {
          id: params.id,
          ifMatch,
          inUse: (work) => hooks.inUse(work, params.id),
        });
        return { status: 204 };
      },
    }),
  ];
};
