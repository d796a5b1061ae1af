import type { OpenPassReasons } from '../../../shared/schedule/reasons/open-passes.ts';
import type { DayModel } from '../../../shared/schedule/model.ts';
import type { OpenPass } from '../../../shared/schemas/plan.ts';
import { lookAnglesAt } from '../../../shared/orbit/track.ts';
import { toIso } from '../../../shared/time.ts';
import type { Deps, Person } from '../../deps.ts';
import { visibleTo } from '../../visible-to.ts';
import type { PlanView } from './plan-read.service.ts';
import type { World } from './world.ts';

/** Names of other missions' satellites are not a lead's to read, not even in a sentence. */
const masked = (day: DayModel, person: Person): DayModel => {
  const visible = visibleTo(person);
  if (visible.everything) return day;
  return {
    ...day,
    missions: day.missions.map((one) =>
      visible.mission(one.id) ? one : { ...one, name: 'another mission' },
    ),
    satellites: day.satellites.map((one) =>
      visible.mission(one.missionId) ? one : { ...one, name: 'a contact of another mission' },
    ),
  };
};

/** Plans in several people's hands at one time. */
const KEPT = 24;

/** Reasons of a day take seconds of thought: they are found in a worker thread and kept for a plan's version. */
export class OpenPasses {
  readonly #deps: Deps;
  readonly #kept = new Map<string, { world: World; found: Promise<OpenPassReasons[]> }>();

  constructor(deps: Deps) {
    this.#deps = deps;
  }

  async of(view: PlanView, person: Person): Promise<OpenPass[]> {
    const visible = visibleTo(person);
    const reasons = await this.#reasons(view, person);
    return reasons.flatMap((one) => {
      const pass = view.world.context.passes.get(one.passId);
      return pass && visible.mission(pass.missionId)
        ? [presentOpenPass(view.world, one, visible.everything)]
        : [];
    });
  }

  #reasons(view: PlanView, person: Person): Promise<OpenPassReasons[]> {
    const { plan, world, contacts } = view;
    const reader = visibleTo(person).everything ? 'all' : person.id;
    const key = `${plan.id} ${plan.contentVersion} ${reader}`;
    const kept = this.#kept.get(key);
    if (kept?.world === world) return kept.found;
    const day = masked(world.day, person);
    const found = this.#deps.pool.run('findReasons', { day, facts: world.facts, contacts });
    this.#kept.set(key, { world, found });
    found.catch(() => this.#kept.delete(key));
    for (const old of [...this.#kept.keys()].slice(0, -KEPT)) this.#kept.delete(old);
    return found;
  }
}

const presentOpenPass = (
  world: World,
  { passId, standing, reasons, wouldFree }: OpenPassReasons,
  mayEdit: boolean,
): OpenPass => {
  const pass = world.context.passes.get(passId);
  if (!pass) throw new Error(`The pass ${passId} left the world while its reasons were found`);
  return {
    passId,
    satelliteId: pass.satelliteId,
    satelliteName: world.context.satellites.get(pass.satelliteId)?.name ?? '',
    missionId: pass.missionId,
    aosUtc: toIso(pass.fromMs),
    tcaUtc: toIso(pass.tcaMs),
    losUtc: toIso(pass.toMs),
    maxElevationDeg: pass.maxElevationDeg,
    aosAzimuthDeg: lookAnglesAt(pass.track, pass.fromMs).azimuthDeg,
    losAzimuthDeg: lookAnglesAt(pass.track, pass.toMs).azimuthDeg,
    standing,
    reasons: reasons.map((reason) => ({
      rule: reason.rule,
      message: reason.message,
      contactIds: reason.contactIds,
      fromUtc: reason.fromMs === null ? null : toIso(reason.fromMs),
      toUtc: reason.toMs === null ? null : toIso(reason.toMs),
      value: reason.value,
      limit: reason.limit,
      unit: reason.unit,
    })),
    wouldFree: wouldFree.map(({ kind, words, costMinutes, edits }) => ({
      kind,
      words,
      costMinutes,
      edits: mayEdit ? edits : [],
    })),
  };
};
