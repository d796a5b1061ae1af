import type { UsableWindow } from '../../../shared/schedule/model.ts';
import { dayOf } from '../../../shared/time.ts';
import { reader, type Deps } from '../../deps.ts';
import type { PassInForce } from '../passes/pass.service.ts';
import { Face } from '../stations/face.entity.ts';
import { planOfRecord } from './day-model.ts';
import type { Worlds } from './world.ts';

/** Usable windows of passes, by the facts of the day in which each begins and that day's stored limit. */
export const windowsOf = async (
  deps: Deps,
  worlds: Worlds,
  passes: readonly PassInForce[],
): Promise<Map<string, UsableWindow[]>> => {
  const em = reader(deps);
  const found = new Map<string, UsableWindow[]>();
  const groups = new Map<string, PassInForce[]>();
  for (const one of passes) {
    const key = `${one.pass.station.id} ${dayOf(one.prediction.aosMs)}`;
    groups.set(key, [...(groups.get(key) ?? []), one]);
  }
  for (const [key, group] of groups) {
    const [stationId = '', day = ''] = key.split(' ');
    const plan = await planOfRecord(em, stationId, day);
    const limit = plan?.limitOfDayDb ?? (await normalLimit(deps, stationId));
    if (limit === null) continue;
    const world = await worlds.of({ station: { id: stationId }, day, limitOfDayDb: limit });
    const ids = new Set(group.map(({ pass }) => pass.id));
    for (const window of world.facts.windows)
      if (ids.has(window.passId))
        found.set(window.passId, [...(found.get(window.passId) ?? []), window]);
  }
  return found;
};

const normalLimit = async (deps: Deps, stationId: string): Promise<number | null> => {
  const faces = await reader(deps).find(Face, { station: stationId });
  return faces.length > 0 ? Math.max(...faces.map((face) => face.normalLimitDb)) : null;
};
