import { allowedIntervalsIn } from '../../../shared/schedule/allowed-intervals.ts';
import type { PassModel } from '../../../shared/schedule/model.ts';
import { servicesOf } from '../../../shared/schedule/services.ts';
import type { OpenPass } from '../../../shared/schemas/plan.ts';
import { toIso } from '../../../shared/time.ts';
import type { Person } from '../../deps.ts';
import { visibleTo } from '../../visible-to.ts';
import type { PlanView } from './plan-read.service.ts';

export const openPassesOf = (view: PlanView, person: Person): OpenPass[] => {
  const visible = visibleTo(person);
  const taken = new Set(view.contacts.map((contact) => contact.passId));
  return view.world.day.passes
    .filter((pass) => !taken.has(pass.id) && visible.mission(pass.missionId))
    .filter((pass) => pass.fromMs >= view.world.day.day.fromMs)
    .map((pass) => openPass(view, pass));
};

const standingOf = (view: PlanView, pass: PassModel): OpenPass['standing'] => {
  const { context, facts, day } = view.world;
  if (!facts.windows.some((one) => one.passId === pass.id)) return 'unusable';
  const minimumMs = Math.min(...servicesOf(day, pass).map((one) => one.minimumMs));
  const isFree = day.channels
    .filter((channel) => channel.direction === 'receive')
    .some((channel) =>
      allowedIntervalsIn(context, {
        contacts: view.contacts,
        channelId: channel.id,
        passId: pass.id,
      }).some((one) => one.toMs - one.fromMs >= minimumMs),
    );
  return isFree ? 'free' : 'stopped';
};

const openPass = (view: PlanView, pass: PassModel): OpenPass => ({
  passId: pass.id,
  satelliteId: pass.satelliteId,
  satelliteName: view.world.context.satellites.get(pass.satelliteId)?.name ?? '',
  missionId: pass.missionId,
  aosUtc: toIso(pass.fromMs),
  tcaUtc: toIso(pass.tcaMs),
  losUtc: toIso(pass.toMs),
  maxElevationDeg: pass.maxElevationDeg,
  aosAzimuthDeg: 0,
  losAzimuthDeg: 0,
  standing: standingOf(view, pass),
  reasons: [],
  wouldFree: [],
});
