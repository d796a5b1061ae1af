import type { PlanContext } from '../../../shared/schedule/context.ts';
import type {
  ContactModel,
  RequestModel,
  RequirementModel,
  SatelliteModel,
} from '../../../shared/schedule/model.ts';
import { asksOn } from '../../../shared/schedule/score/hours.ts';
import { makeQualifier } from '../../../shared/schedule/score/qualifying.ts';
import { linesAt } from '../../../shared/schedule/services.ts';
import { intersect, MINUTE_MS, SECOND_MS } from '../../../shared/time.ts';
import type { Demand, Maximum, ShortfallPiece } from '../model/assignment.ts';
import { gapDemands } from './gap-demands.ts';
import { legsOf, type Legs } from './option-legs.ts';
import type { Option } from './options.ts';

/** What a missing unit costs: one contact, ten minutes, or the volume of ten minutes. */
const UNIT_MINUTES = 10;
/** Slopes of four equal steps of a shortfall, mean 1: the last of what is missing hurts most, so all miss a little. */
const SLOPES = [0.25, 0.75, 1.25, 1.75] as const;

export const convexPieces = (least: number, unit: number): ShortfallPiece[] =>
  SLOPES.map((slope) => ({ size: least / SLOPES.length, cost: slope / unit }));

/** A demand by amounts, or nothing when the fixed contacts give it already. */
export interface Asked {
  demands: Demand[];
  maximums: Maximum[];
}

interface LineSetting {
  context: PlanContext;
  options: readonly Option[];
  fixed: readonly ContactModel[];
  qualify: ReturnType<typeof makeQualifier>;
}

const amountOf = (
  what: RequirementModel['what'],
  receiveMs: number,
  satellite: SatelliteModel | undefined,
): number => {
  if (what === 'contacts') return 1;
  if (what === 'minutes') return receiveMs / MINUTE_MS;
  return ((satellite?.downlink.rateKbps ?? 0) / 1000) * (receiveMs / SECOND_MS);
};

const unitOf = (line: RequirementModel, satellite: SatelliteModel | undefined): number => {
  if (line.what === 'contacts') return 1;
  if (line.what === 'minutes') return UNIT_MINUTES;
  return Math.max(1e-6, amountOf('volume', UNIT_MINUTES * MINUTE_MS, satellite));
};

/** What one line asks for one satellite, or for all of a mission's (satelliteId null). */
function askedByLine(
  setting: LineSetting,
  line: RequirementModel,
  satelliteId: string | null,
): Asked {
  const { context, options, fixed, qualify } = setting;
  const { day } = context.day;
  const concerns = (one: { missionId: string; satelliteId: string }): boolean =>
    one.missionId === line.missionId && (satelliteId === null || one.satelliteId === satelliteId);
  const counted = (legs: Legs, ofSatellite: string): number => {
    const served = qualify(line, legs);
    return served.counts
      ? amountOf(line.what, served.receiveMs, context.satellites.get(ofSatellite))
      : 0;
  };
  const members: number[] = [];
  const amounts: number[] = [];
  for (const [index, option] of options.entries()) {
    if (!concerns(option.pass)) continue;
    const amount = counted(legsOf(option), option.pass.satelliteId);
    if (amount <= 0) continue;
    members.push(index);
    amounts.push(amount);
  }
  const given = fixed
    .filter((contact) => concerns(contact))
    .filter(({ receive }) => receive.fromMs >= day.fromMs && receive.fromMs < day.toMs)
    .reduce((sum, contact) => sum + counted(contact, contact.satelliteId), 0);
  const level = context.missions.get(line.missionId)?.priority ?? 5;
  const name = `${line.id}|${satelliteId ?? ''}`;
  const least = (line.least ?? 0) - given;
  const anySatellite = context.day.satellites.find((one) =>
    concerns({ ...one, satelliteId: one.id }),
  );
  const pieces = convexPieces(least, unitOf(line, anySatellite));
  return {
    demands: least > 1e-9 ? [{ name, level, members, amounts, least, pieces }] : [],
    maximums:
      line.most === null ? [] : [{ name, members, amounts, most: Math.max(0, line.most - given) }],
  };
}

/** A request that asks for something: its pass, or minutes of its satellite before the deadline. */
function askedByRequest({ context, options, fixed }: LineSetting, request: RequestModel): Demand[] {
  if (request.kind === 'none' || intersect(request, context.day.day) === null) return [];
  const amount = (one: Legs & { satelliteId: string }): number => {
    if (one.satelliteId !== request.satelliteId) return 0;
    if (request.uplink === 'required' && one.transmit === null) return 0;
    if (request.kind === 'pass') return one.passId === request.passId ? 1 : 0;
    const during = intersect(one.receive, request);
    return during ? (during.toMs - during.fromMs) / MINUTE_MS : 0;
  };
  const members: number[] = [];
  const amounts: number[] = [];
  for (const [index, option] of options.entries()) {
    const given = amount({ ...legsOf(option), satelliteId: option.pass.satelliteId });
    if (given <= 0) continue;
    members.push(index);
    amounts.push(given);
  }
  const asked = request.kind === 'pass' ? 1 : (request.minutes ?? 0);
  const least = asked - fixed.reduce((sum, contact) => sum + amount(contact), 0);
  if (least <= 1e-9) return [];
  const unit = request.kind === 'pass' ? 1 : UNIT_MINUTES;
  const pieces = convexPieces(least, unit);
  return [
    { name: `request ${request.id}`, level: request.priority, members, amounts, least, pieces },
  ];
}

/** Everything requirement lines and requests ask of the options, what the fixed contacts give already taken off. */
export function askedOfDay(
  context: PlanContext,
  options: readonly Option[],
  fixed: readonly ContactModel[],
): Asked {
  const qualify = makeQualifier(context.day);
  const setting = { context, options, fixed, qualify };
  const asked: Asked = { demands: [], maximums: [] };
  for (const mission of context.day.missions)
    for (const line of linesAt(context.day, mission.id)) {
      if (!asksOn(line, context.day.day.fromMs)) continue;
      const own = context.day.satellites.filter(({ missionId }) => missionId === mission.id);
      const whom = line.appliesTo === 'together' ? [null] : own.map(({ id }) => id);
      for (const satelliteId of whom) {
        if (line.what === 'gap') {
          asked.demands.push(...gapDemands(setting, line, satelliteId));
          continue;
        }
        const one = askedByLine(setting, line, satelliteId);
        asked.demands.push(...one.demands);
        asked.maximums.push(...one.maximums);
      }
    }
  for (const request of context.day.requests)
    asked.demands.push(...askedByRequest(setting, request));
  return asked;
}
