import { randomUUID } from 'node:crypto';
import type { EntityManager } from '@mikro-orm/sqlite';
import type { CreateSatellite, PatchSatellite } from '../../../shared/schemas/satellite.ts';
import { inTransaction, type Deps, type Person, type Work } from '../../deps.ts';
import { conflict, notFound, unprocessable } from '../../errors.ts';
import { checkTag } from '../../middleware/tags.ts';
import { listPage, type PageWish } from '../../paging.ts';
import { visibleTo } from '../../visible-to.ts';
import { audit } from '../audit/audit.service.ts';
import { Mission } from '../missions/mission.entity.ts';
import { Satellite } from './satellite.entity.ts';

export interface SatelliteFilter extends PageWish {
  missionId?: string | undefined;
}

export const listSatellites = (em: EntityManager, person: Person, filter: SatelliteFilter) =>
  listPage<Satellite>(em, Satellite, filter, {
    sort: 'name',
    where: {
      $and: [
        visibleTo(person).where('mission'),
        filter.missionId ? { mission: filter.missionId } : {},
      ],
    },
  });

export const getSatellite = async (
  em: EntityManager,
  person: Person,
  id: string,
): Promise<Satellite> => {
  const satellite = await em.findOne(Satellite, id);
  if (!satellite || !visibleTo(person).mission(satellite.mission.id))
    throw notFound('The satellite');
  return satellite;
};

export const ownsSatellite = async (
  em: EntityManager,
  satelliteId: string,
  missionId: string,
): Promise<boolean> => (await em.count(Satellite, { id: satelliteId, mission: missionId })) > 0;

export const missionInUse = async ({ em }: Work, missionId: string): Promise<boolean> =>
  (await em.count(Satellite, { mission: missionId })) > 0;

const refuseTaken = async (
  em: EntityManager,
  id: string,
  { name, catalogNumber }: { name?: string | undefined; catalogNumber?: number | null | undefined },
): Promise<void> => {
  if (name !== undefined && (await em.findOne(Satellite, { name, id: { $ne: id } })))
    throw conflict('name-taken', `A satellite named ${name} exists already.`);
  if (catalogNumber === undefined || catalogNumber === null) return;
  const other = await em.findOne(Satellite, { catalogNumber, id: { $ne: id } });
  if (other)
    throw conflict('catalog-number-taken', `${catalogNumber} is the number of ${other.name}.`);
};

const requireMission = async (em: EntityManager, missionId: string): Promise<void> => {
  if (await em.findOne(Mission, missionId)) return;
  throw unprocessable('unknown-mission', 'The mission does not exist.', [
    { pointer: '/missionId', detail: 'Choose a mission of the list' },
  ]);
};

/** After a satellite was added or got another number: element sets that wait for it (wired in app.ts). */
export type Adopt = (work: Work, satellite: Satellite) => Promise<void>;

export const createSatellite = (
  deps: Deps,
  person: Person,
  { wish, adopt }: { wish: CreateSatellite; adopt: Adopt },
): Promise<Satellite> =>
  inTransaction(deps, async (work) => {
    const id = randomUUID();
    await requireMission(work.em, wish.missionId);
    await refuseTaken(work.em, id, wish);
    const { missionId, ...fields } = wish;
    const satellite = work.em.create(Satellite, { id, mission: missionId, ...fields });
    await work.em.flush();
    await audit(work, person, {
      action: 'satellite.create',
      entity: 'satellite',
      entityId: id,
      missionId,
      summary: `Satellite ${satellite.name}`,
      details: { catalogNumber: satellite.catalogNumber },
    });
    await adopt(work, satellite);
    work.tell({ topic: 'fleet', id, version: satellite.version });
    return satellite;
  });

const change = (satellite: Satellite, em: EntityManager, wish: PatchSatellite): void => {
  if (wish.name !== undefined) satellite.name = wish.name;
  if (wish.catalogNumber !== undefined) satellite.catalogNumber = wish.catalogNumber;
  if (wish.missionId !== undefined) satellite.mission = em.getReference(Mission, wish.missionId);
  if (wish.downlink !== undefined) satellite.downlink = wish.downlink;
  if (wish.uplink !== undefined) satellite.uplink = wish.uplink;
  if (wish.transmitsAlways !== undefined) satellite.transmitsAlways = wish.transmitsAlways;
  if (wish.requiredCOverIDb !== undefined) satellite.requiredCOverIDb = wish.requiredCOverIDb;
  if (wish.guardTimeSeconds !== undefined) satellite.guardTimeSeconds = wish.guardTimeSeconds;
  if (wish.timeUncertaintySeconds !== undefined)
    satellite.timeUncertaintySeconds = wish.timeUncertaintySeconds;
  if (wish.retired !== undefined) satellite.retired = wish.retired;
};

export const patchSatellite = (
  deps: Deps,
  person: Person,
  { id, wish, ifMatch, adopt }: { id: string; wish: PatchSatellite; ifMatch: string; adopt: Adopt },
): Promise<Satellite> =>
  inTransaction(deps, async (work) => {
    const satellite = await getSatellite(work.em, person, id);
    checkTag(ifMatch, satellite.id, satellite.version, 'The satellite');
    if (wish.missionId) await requireMission(work.em, wish.missionId);
    await refuseTaken(work.em, id, wish);
    const numberBefore = satellite.catalogNumber;
    change(satellite, work.em, wish);
    await work.em.flush();
    await audit(work, person, {
      action: 'satellite.change',
      entity: 'satellite',
      entityId: id,
      missionId: satellite.mission.id,
      summary: `Satellite ${satellite.name} changed`,
      details: { ...wish },
    });
    if (satellite.catalogNumber !== numberBefore) await adopt(work, satellite);
    work.tell({ topic: 'fleet', id, version: satellite.version });
    return satellite;
  });

export const deleteSatellite = (
  deps: Deps,
  person: Person,
  { id, ifMatch, inUse }: { id: string; ifMatch: string; inUse: (w: Work) => Promise<boolean> },
): Promise<void> =>
  inTransaction(deps, async (work) => {
    const satellite = await getSatellite(work.em, person, id);
    checkTag(ifMatch, satellite.id, satellite.version, 'The satellite');
    if (await inUse(work))
      throw conflict(
        'in-use',
        `Element sets, passes or contacts refer to ${satellite.name}. Retire it instead.`,
      );
    await work.em.nativeDelete(Satellite, { id });
    await audit(work, person, {
      action: 'satellite.delete',
      entity: 'satellite',
      entityId: id,
      missionId: satellite.mission.id,
      summary: `Satellite ${satellite.name} deleted`,
    });
    work.tell({ topic: 'fleet', id, version: satellite.version });
  });
