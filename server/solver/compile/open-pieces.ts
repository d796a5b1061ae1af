import type { PlanContext } from '../../../shared/schedule/context.ts';
import { subtract } from '../../../shared/schedule/intervals.ts';
import type { PassModel, SatelliteModel } from '../../../shared/schedule/model.ts';
import { intersect, roundInward, SECOND_MS, type Interval } from '../../../shared/time.ts';
import type { ChannelGroup } from './channel-groups.ts';
import type { FixedPlan } from './fixed-plan.ts';

/** Where at least `count` of the intervals are on at once. */
export function crowded(intervals: readonly Interval[], count: number): Interval[] {
  const edges = intervals
    .flatMap(({ fromMs, toMs }) => [
      { ms: fromMs, step: 1 },
      { ms: toMs, step: -1 },
    ])
    .sort((a, b) => a.ms - b.ms || a.step - b.step);
  const found: Interval[] = [];
  let [level, openedMs] = [0, 0];
  for (const { ms, step } of edges) {
    if (level < count && level + step >= count) openedMs = ms;
    if (level >= count && level + step < count) found.push({ fromMs: openedMs, toMs: ms });
    level += step;
  }
  return found;
}

/** What the set-up, the tear-down and the time uncertainty add before and after a leg on a group. */
export function margins(group: ChannelGroup, satellite: SatelliteModel): [number, number] {
  const early = group.direction === 'receive' ? satellite.timeUncertaintySeconds * SECOND_MS : 0;
  return [group.setUpMs + early, group.tearDownMs + early];
}

/** Instants at which the legs of a pass on a group must not be on, beside a fixed plan. */
function forbidden(
  context: PlanContext,
  fixed: FixedPlan,
  group: ChannelGroup,
  pass: PassModel,
  satellite: SatelliteModel,
): Interval[] {
  const { faceId, direction } = group;
  const [beforeMs, afterMs] = margins(group, satellite);
  const taken = group.channels.flatMap(({ id }) => fixed.heldOn(id));
  const full = crowded(taken, group.channels.length).map(({ fromMs, toMs }) => ({
    fromMs: fromMs - afterMs,
    toMs: toMs + beforeMs,
  }));
  const legs = fixed.legsOn(faceId, direction);
  const tooClose = context
    .conflictsOf(pass.id, faceId, direction)
    .flatMap((conflict) =>
      legs
        .filter(
          ({ contact }) => contact.passId !== pass.id && conflict.passIds.includes(contact.passId),
        )
        .flatMap(({ leg }) => intersect(leg, conflict) ?? []),
    );
  const unwanted = context.day.requests.filter(
    ({ kind, satelliteId }) => kind === 'none' && satelliteId === satellite.id,
  );
  const rest =
    direction === 'receive'
      ? fixed.downlinksOf(satellite.id)
      : transmitFull(context, fixed, faceId);
  return [...group.closed, ...full, ...tooClose, ...unwanted, ...rest];
}

function transmitFull(context: PlanContext, fixed: FixedPlan, faceId: string): Interval[] {
  const limit = context.faces.get(faceId)?.transmitBeamLimit ?? 0;
  if (limit <= 0) return [{ fromMs: -Infinity, toMs: Infinity }];
  return crowded(
    fixed.legsOn(faceId, 'transmit').map(({ leg }) => leg),
    limit,
  );
}

/** What of a span is left for legs of the pass on the group beside the fixed plan, in whole seconds. */
export function openPieces(
  context: PlanContext,
  fixed: FixedPlan,
  question: { group: ChannelGroup; pass: PassModel; satellite: SatelliteModel; span: Interval },
): Interval[] {
  const { group, pass, satellite, span } = question;
  const blocked = forbidden(context, fixed, group, pass, satellite);
  return subtract(span, blocked).flatMap((piece) => roundInward(piece) ?? []);
}
