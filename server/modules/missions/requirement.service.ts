import { randomUUID } from 'node:crypto';
import type { EntityManager } from '@mikro-orm/sqlite';
import { CreateRequirement, type CreateRequest } from '../../../shared/schemas/requirement.ts';
import type { PatchRequirement } from '../../../shared/schemas/requirement.ts';
import type { z } from 'zod';
import { fromIso } from '../../../shared/time.ts';
import { inTransaction, type Deps, type Person } from '../../deps.ts';
import { conflict, notFound, unprocessable } from '../../errors.ts';
import { checkTag } from '../../middleware/tags.ts';
import { listPage, type PageWish } from '../../paging.ts';
import { visibleTo } from '../../visible-to.ts';
import { audit } from '../audit/audit.service.ts';
import { getMission, requireMissionRight } from './mission.service.ts';
import { RequestRow, RequirementRow } from './requirement.entity.ts';

export interface MissionFilter extends PageWish {
  missionId?: string | undefined;
}

const scope = (person: Person, { missionId }: MissionFilter): object => ({
  $and: [visibleTo(person).where('mission'), missionId ? { mission: missionId } : {}],
});

export const listRequirements = (em: EntityManager, person: Person, filter: MissionFilter) =>
  listPage<RequirementRow>(em, RequirementRow, filter, {
    sort: 'what',
    where: scope(person, filter),
  });

export const listRequests = (em: EntityManager, person: Person, filter: MissionFilter) =>
  listPage<RequestRow>(em, RequestRow, filter, { sort: 'fromMs', where: scope(person, filter) });

export const getRequirement = async (
  em: EntityManager,
  person: Person,
  id: string,
): Promise<RequirementRow> => {
  const row = await em.findOne(RequirementRow, id);
  if (!row || !visibleTo(person).mission(row.mission.id)) throw notFound('The requirement line');
  return row;
};

export const createRequirement = (deps: Deps, person: Person, wish: CreateRequirement) =>
  inTransaction(deps, async (work) => {
    await getMission(work.em, person, wish.missionId);
    requireMissionRight(person, 'edit.requirements', wish.missionId);
    const { missionId, ...fields } = wish;
    const row = work.em.create(RequirementRow, { id: randomUUID(), mission: missionId, ...fields });
    await work.em.flush();
    await audit(work, person, {
      action: 'requirement.create',
      entity: 'requirement',
      entityId: row.id,
      missionId,
      summary: `Requirement line for ${row.what}`,
      details: { ...fields },
    });
    work.tell({ topic: 'fleet', id: row.id, version: row.version });
    return row;
  });

export const patchRequirement = (
  deps: Deps,
  person: Person,
  { id, wish, ifMatch }: { id: string; wish: z.infer<typeof PatchRequirement>; ifMatch: string },
) =>
  inTransaction(deps, async (work) => {
    const row = await getRequirement(work.em, person, id);
    requireMissionRight(person, 'edit.requirements', row.mission.id);
    checkTag(ifMatch, row.id, row.version, 'The requirement line');
    const whole = CreateRequirement.safeParse({
      missionId: row.mission.id,
      appliesTo: wish.appliesTo ?? row.appliesTo,
      stationId: wish.stationId === undefined ? row.stationId : wish.stationId,
      what: wish.what ?? row.what,
      least: wish.least === undefined ? row.least : wish.least,
      most: wish.most === undefined ? row.most : wish.most,
      minimumDurationSeconds: wish.minimumDurationSeconds ?? row.minimumDurationSeconds,
      uplink: wish.uplink ?? row.uplink,
      leastUplinkMinutes:
        wish.leastUplinkMinutes === undefined ? row.leastUplinkMinutes : wish.leastUplinkMinutes,
      minimumElevationDeg:
        wish.minimumElevationDeg === undefined ? row.minimumElevationDeg : wish.minimumElevationDeg,
      marginFloorDb: wish.marginFloorDb === undefined ? row.marginFloorDb : wish.marginFloorDb,
      hoursUtc: wish.hoursUtc === undefined ? row.hoursUtc : wish.hoursUtc,
      weekdays: wish.weekdays === undefined ? row.weekdays : wish.weekdays,
      scanLossLimitDb:
        wish.scanLossLimitDb === undefined ? row.scanLossLimitDb : wish.scanLossLimitDb,
    });
    if (!whole.success)
      throw unprocessable('invalid-body', 'The line would not make sense.', [
        {
          pointer: `/${whole.error.issues[0]?.path.join('/') ?? ''}`,
          detail: whole.error.issues[0]?.message ?? '',
        },
      ]);
    const { missionId: _missionId, ...fields } = whole.data;
    Object.assign(row, fields);
    await work.em.flush();
    await audit(work, person, {
      action: 'requirement.change',
      entity: 'requirement',
      entityId: row.id,
      missionId: row.mission.id,
      summary: `Requirement line for ${row.what} changed`,
      details: { ...wish },
    });
    work.tell({ topic: 'fleet', id: row.id, version: row.version });
    return row;
  });

export const deleteRequirement = (
  deps: Deps,
  person: Person,
  { id, ifMatch }: { id: string; ifMatch: string },
) =>
  inTransaction(deps, async (work) => {
    const row = await getRequirement(work.em, person, id);
    const missionId = row.mission.id;
    requireMissionRight(person, 'edit.requirements', missionId);
    checkTag(ifMatch, row.id, row.version, 'The requirement line');
    await work.em.nativeDelete(RequirementRow, { id });
    await audit(work, person, {
      action: 'requirement.delete',
      entity: 'requirement',
      entityId: id,
      missionId,
      summary: `Requirement line for ${row.what} deleted`,
    });
    work.tell({ topic: 'fleet', id, version: row.version });
  });

export const createRequest = (
  deps: Deps,
  person: Person,
  wish: CreateRequest,
  isOwnSatellite: (em: EntityManager, satelliteId: string, missionId: string) => Promise<boolean>,
) =>
  inTransaction(deps, async (work) => {
    await getMission(work.em, person, wish.missionId);
    requireMissionRight(person, 'edit.requests', wish.missionId);
    const { missionId, fromUtc, toUtc, ...fields } = wish;
    if (!(await isOwnSatellite(work.em, wish.satelliteId, missionId)))
      throw unprocessable('foreign-satellite', 'The satellite belongs to another mission.', [
        { pointer: '/satelliteId', detail: 'A satellite of this mission is needed' },
      ]);
    if (fromIso(fromUtc) >= fromIso(toUtc))
      throw unprocessable('invalid-body', 'The end lies after the beginning.', [
        { pointer: '/toUtc', detail: 'The end lies after the beginning' },
      ]);
    const row = work.em.create(RequestRow, {
      id: randomUUID(),
      mission: missionId,
      fromMs: fromIso(fromUtc),
      toMs: fromIso(toUtc),
      ...fields,
    });
    await work.em.flush();
    await audit(work, person, {
      action: 'request.create',
      entity: 'request',
      entityId: row.id,
      missionId,
      summary: `Request: ${row.reason}`,
      details: { ...fields },
    });
    work.tell({ topic: 'fleet', id: row.id, version: row.version });
    return row;
  });

export const withdrawRequest = (
  deps: Deps,
  person: Person,
  { id, ifMatch }: { id: string; ifMatch: string },
) =>
  inTransaction(deps, async (work) => {
    const row = await work.em.findOne(RequestRow, id);
    if (!row || !visibleTo(person).mission(row.mission.id)) throw notFound('The request');
    requireMissionRight(person, 'edit.requests', row.mission.id);
    checkTag(ifMatch, row.id, row.version, 'The request');
    if (row.state === 'withdrawn') throw conflict('withdrawn', 'The request is withdrawn already.');
    row.state = 'withdrawn';
    await work.em.flush();
    await audit(work, person, {
      action: 'request.withdraw',
      entity: 'request',
      entityId: id,
      missionId: row.mission.id,
      summary: `Request withdrawn: ${row.reason}`,
    });
    work.tell({ topic: 'fleet', id, version: row.version });
    return row;
  });
