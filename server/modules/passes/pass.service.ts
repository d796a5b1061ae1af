import type { EntityManager } from '@mikro-orm/sqlite';
import { fromIso } from '../../../shared/time.ts';
import type { Person } from '../../deps.ts';
import { notFound } from '../../errors.ts';
import { listPage, type PageWish } from '../../paging.ts';
import { visibleTo } from '../../visible-to.ts';
import { Satellite } from '../satellites/satellite.entity.ts';
import { Pass, Prediction } from './pass.entity.ts';

export interface PassFilter extends PageWish {
  stationId?: string | undefined;
  fromUtc?: string | undefined;
  toUtc?: string | undefined;
  satelliteId?: string | undefined;
  missionId?: string | undefined;
  minElevationDeg?: number | undefined;
}
export interface PassInForce {
  pass: Pass;
  prediction: Prediction;
  satellite: Satellite;
}

/** Passes with the prediction in force and their satellite. `withTracks` reads the knots, too. */
export const inForce = async (
  em: EntityManager,
  passes: Pass[],
  { withTracks = false } = {},
): Promise<PassInForce[]> => {
  const predictions = await em.find(
    Prediction,
    { id: { $in: passes.map((pass) => pass.predictionId) } },
    { populate: withTracks ? ['track', 'elementSet'] : ['elementSet'] },
  );
  const byId = new Map(predictions.map((prediction) => [prediction.id, prediction]));
  const satellites = await em.find(Satellite, {
    id: { $in: [...new Set(passes.map((pass) => pass.satellite.id))] },
  });
  const satelliteById = new Map(satellites.map((satellite) => [satellite.id, satellite]));
  return passes.flatMap((pass) => {
    const prediction = byId.get(pass.predictionId);
    const satellite = satelliteById.get(pass.satellite.id);
    return prediction && satellite ? [{ pass, prediction, satellite }] : [];
  });
};

/** Passes that touch the interval asked for, by AOS. */
export const listPasses = async (em: EntityManager, person: Person, filter: PassFilter) => {
  const visible = visibleTo(person);
  const satelliteWhere = {
    $and: [
      visible.where('mission'),
      filter.missionId ? { mission: filter.missionId } : {},
      filter.satelliteId ? { id: filter.satelliteId } : {},
    ],
  };
  const isNarrowed = !visible.everything || filter.missionId || filter.satelliteId;
  const narrowed = isNarrowed ? { satellite: satelliteWhere } : {};
  const found = await listPage<Pass>(em, Pass, filter, {
    sort: 'aosMs',
    where: {
      $and: [
        { vanished: false },
        filter.stationId ? { station: filter.stationId } : {},
        filter.fromUtc ? { losMs: { $gt: fromIso(filter.fromUtc) } } : {},
        filter.toUtc ? { aosMs: { $lt: fromIso(filter.toUtc) } } : {},
        filter.minElevationDeg ? { maxElevationDeg: { $gte: filter.minElevationDeg } } : {},
        narrowed,
      ],
    },
  });
  return { items: await inForce(em, found.items), nextCursor: found.nextCursor };
};

export const getPass = async (
  em: EntityManager,
  person: Person,
  id: string,
): Promise<PassInForce> => {
  const pass = await em.findOne(Pass, id);
  const [found] = pass ? await inForce(em, [pass], { withTracks: true }) : [];
  if (!found || !visibleTo(person).mission(found.satellite.mission.id)) throw notFound('The pass');
  return found;
};
