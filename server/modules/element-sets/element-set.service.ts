import { randomUUID } from 'node:crypto';
import type { EntityManager } from '@mikro-orm/sqlite';
import type { Person, Work } from '../../deps.ts';
import { inTransaction, type Deps } from '../../deps.ts';
import { conflict, notFound } from '../../errors.ts';
import { listPage, type PageWish } from '../../paging.ts';
import { visibleTo } from '../../visible-to.ts';
import { audit } from '../audit/audit.service.ts';
import { Satellite } from '../satellites/satellite.entity.ts';
import type { InUse } from '../satellites/satellite.presenter.ts';
import { ElementSet, ElementSetUpload, type ElementSetState } from './element-set.entity.ts';

export interface ElementSetFilter extends PageWish {
  satelliteId?: string | undefined;
  state?: ElementSetState | undefined;
}

export const listElementSets = async (
  em: EntityManager,
  person: Person,
  { satelliteId, state, ...wish }: ElementSetFilter,
) => {
  const visible = visibleTo(person);
  const own = visible.everything
    ? {}
    : { satellite: { mission: { $in: [...person.leadsMissionIds] } } };
  const found = await listPage<ElementSet>(em, ElementSet, wish, {
    sort: 'epochMs',
    descending: true,
    where: {
      $and: [satelliteId ? { satellite: satelliteId } : {}, state ? { state } : {}, own],
    },
  });
  await em.populate(found.items, ['satellite', 'upload']);
  return found;
};

export const setsInUse = async (
  em: EntityManager,
  satelliteIds: string[],
): Promise<Map<string, InUse>> => {
  const sets = await em.find(ElementSet, { satellite: { $in: satelliteIds }, state: 'in-use' });
  return new Map(
    sets.flatMap((set) =>
      set.satellite ? [[set.satellite.id, { id: set.id, epochMs: set.epochMs }]] : [],
    ),
  );
};

export const elementSetsOf = (em: EntityManager, satelliteId: string): Promise<number> =>
  em.count(ElementSet, { satellite: satelliteId });

/**
 * Decides which set of a satellite is in use: the newest epoch among those that may be used now. Sets that wait
 * stay candidates, the others become former ones. Returns whether the set in use has changed.
 */
export const chooseInUse = async ({ em, nowMs }: Work, satelliteId: string): Promise<boolean> => {
  const sets = await em.find(
    ElementSet,
    { satellite: satelliteId, state: { $ne: 'withdrawn' } },
    { orderBy: { epochMs: 'desc', createdMs: 'desc' } },
  );
  const before = sets.find((set) => set.state === 'in-use');
  const chosen = sets.find((set) => (set.useFromMs ?? 0) <= nowMs);
  for (const set of sets) {
    if (set === chosen) set.state = 'in-use';
    else set.state = (set.useFromMs ?? 0) > nowMs ? 'candidate' : 'former';
  }
  await em.flush();
  return before?.id !== chosen?.id;
};

/** Sets that were stored without a satellite belong to the one that got their number. */
export const adoptWaitingSets = async (work: Work, satellite: Satellite): Promise<void> => {
  if (satellite.catalogNumber == null) return;
  const waiting = await work.em.find(ElementSet, {
    catalogNumber: satellite.catalogNumber,
    satellite: null,
  });
  for (const set of waiting) set.satellite = satellite;
  await work.em.flush();
  if (waiting.length > 0 && (await chooseInUse(work, satellite.id)))
    work.tell({
      topic: 'elements',
      id: satellite.id,
      version: 1,
      satelliteIds: [satellite.id],
    });
};

/** The set before it is in use again, and the passes follow. */
export const withdrawElementSet = (
  deps: Deps,
  person: Person,
  { id, reason }: { id: string; reason: string },
): Promise<ElementSet> =>
  inTransaction(deps, async (work) => {
    const set = await work.em.findOne(ElementSet, id, { populate: ['satellite', 'upload'] });
    const missionId = set?.satellite ? set.satellite.mission.id : null;
    if (!set || !visibleTo(person).mission(missionId)) throw notFound('The element set');
    if (set.state === 'withdrawn') throw conflict('withdrawn', 'It is withdrawn already.');
    const wasInUse = set.state === 'in-use';
    set.state = 'withdrawn';
    set.withdrawnReason = reason;
    await work.em.flush();
    await audit(work, person, {
      action: 'element-set.withdraw',
      entity: 'element-set',
      entityId: id,
      missionId,
      summary: `Element set of ${set.name ?? set.catalogNumber} withdrawn: ${reason}`,
    });
    if (wasInUse && set.satellite) {
      await chooseInUse(work, set.satellite.id);
      work.tell({ topic: 'elements', id, version: 1, satelliteIds: [set.satellite.id] });
    }
    return set;
  });

/** Sets whose time to be used has come. */
export const activateCandidates = (deps: Deps): Promise<void> =>
  inTransaction(deps, async (work) => {
    const due = await work.em.find(ElementSet, {
      state: 'candidate',
      useFromMs: { $lte: work.nowMs },
    });
    const satelliteIds = [
      ...new Set(due.flatMap((set) => (set.satellite ? [set.satellite.id] : []))),
    ];
    const changed: string[] = [];
    for (const id of satelliteIds) if (await chooseInUse(work, id)) changed.push(id);
    if (changed.length > 0)
      work.tell({ topic: 'elements', id: randomUUID(), version: 1, satelliteIds: changed });
  });

export const listUploads = (em: EntityManager, person: Person, wish: PageWish) =>
  listPage<ElementSetUpload>(em, ElementSetUpload, wish, {
    sort: 'uploadedMs',
    descending: true,
    where: visibleTo(person).everything ? {} : { uploadedById: person.id },
  });

export const getUpload = async (
  em: EntityManager,
  person: Person,
  id: string,
): Promise<ElementSetUpload> => {
  const upload = await em.findOne(ElementSetUpload, id);
  const isOwn = upload?.uploadedById === person.id;
  if (!upload || !(isOwn || visibleTo(person).everything)) throw notFound('The upload');
  return upload;
};
