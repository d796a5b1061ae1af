import type {
  ChannelModel,
  ConflictInterval,
  DayModel,
  Direction,
  FaceModel,
  Facts,
  HardEndInterval,
  MissionModel,
  PassModel,
  SatelliteModel,
  UsableWindow,
} from './model.ts';

/** A day and its facts, indexed for looking up. Made once and used for many plans of the day. */
export interface PlanContext {
  day: DayModel;
  facts: Facts;
  satellites: ReadonlyMap<string, SatelliteModel>;
  channels: ReadonlyMap<string, ChannelModel>;
  faces: ReadonlyMap<string, FaceModel>;
  passes: ReadonlyMap<string, PassModel>;
  missions: ReadonlyMap<string, MissionModel>;
  windowsOf: (passId: string, faceId: string, direction: Direction) => readonly UsableWindow[];
  hardEndOf: (passId: string, faceId: string, direction: Direction) => readonly HardEndInterval[];
  conflictsOf: (
    passId: string,
    faceId: string,
    direction: Direction,
  ) => readonly ConflictInterval[];
}

type Keyed = { faceId: string; direction: Direction };

function indexed<T extends Keyed>(
  items: readonly T[],
  passIdsOf: (item: T) => readonly string[],
): (passId: string, faceId: string, direction: Direction) => readonly T[] {
  const index = new Map<string, T[]>();
  for (const item of items)
    for (const passId of passIdsOf(item)) {
      const key = `${passId}|${item.faceId}|${item.direction}`;
      const list = index.get(key);
      if (list) list.push(item);
      else index.set(key, [item]);
    }
  return (passId, faceId, direction) => index.get(`${passId}|${faceId}|${direction}`) ?? [];
}

const byId = <T extends { id: string }>(items: readonly T[]): ReadonlyMap<string, T> =>
  new Map(items.map((item) => [item.id, item]));

export function planContext(day: DayModel, facts: Facts): PlanContext {
  return {
    day,
    facts,
    satellites: byId(day.satellites),
    channels: byId(day.channels),
    faces: byId(day.faces),
    passes: byId(day.passes),
    missions: byId(day.missions),
    windowsOf: indexed(facts.windows, (window) => [window.passId]),
    hardEndOf: indexed(facts.withinHardEnd, (interval) => [interval.passId]),
    conflictsOf: indexed(facts.conflicts, (conflict) => conflict.passIds),
  };
}

const nameIn = (map: ReadonlyMap<string, { name: string }>, id: string, what: string): string =>
  map.get(id)?.name ?? `an unknown ${what}`;

export const satelliteName = (context: PlanContext, id: string): string =>
  nameIn(context.satellites, id, 'satellite');

export const missionName = (context: PlanContext, id: string): string =>
  nameIn(context.missions, id, 'mission');

export const channelLabel = (context: PlanContext, id: string): string =>
  context.channels.get(id)?.label ?? 'an unknown channel';

export const faceLabel = (context: PlanContext, id: string): string =>
  context.faces.get(id)?.label ?? 'an unknown face';
