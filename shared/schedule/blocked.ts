import { intersect, type Interval } from '../time.ts';
import { closuresOf } from './closures.ts';
import type { PlanContext } from './context.ts';
import { guardMs, holding } from './holding.ts';
import { widen } from './intervals.ts';
import type {
  ChannelModel,
  ClosureModel,
  ConflictInterval,
  PassModel,
  Rule,
  SatelliteModel,
} from './model.ts';
import { type PlanLeg } from './plan-legs.ts';
import { fitsBand, fitsChannel, radioFor } from './radio-fit.ts';
import { crowdedIntervals } from './rules/transmit-limit.ts';

/** An interval that a leg must keep clear of, and what stands there. */
export interface Blocked extends Interval {
  rule: Rule;
  legs: PlanLeg[];
  closure: ClosureModel | null;
  conflict: ConflictInterval | null;
}

/** A leg that is being thought of: this pass on this channel. */
export interface Candidate {
  pass: PassModel;
  satellite: SatelliteModel;
  channel: ChannelModel;
}

const by = (rule: Rule, interval: Interval, legs: PlanLeg[]): Blocked => ({
  rule,
  fromMs: interval.fromMs,
  toMs: interval.toMs,
  legs,
  closure: null,
  conflict: null,
});

/** Another leg holds the channel: ours must keep clear of it by both holdings. */
function busy({ channel, satellite }: Candidate, legs: readonly PlanLeg[]): Blocked[] {
  const around = holding({ fromMs: 0, toMs: 0 }, channel, satellite);
  return legs
    .filter(({ leg }) => leg.channelId === channel.id)
    .map((other) =>
      by(
        'channel-busy',
        { fromMs: other.held.fromMs - around.toMs, toMs: other.held.toMs - around.fromMs },
        [other],
      ),
    );
}

function tooClose(context: PlanContext, candidate: Candidate, legs: readonly PlanLeg[]): Blocked[] {
  const { pass, channel } = candidate;
  const conflicts = context.conflictsOf(pass.id, channel.faceId, channel.direction);
  if (conflicts.length === 0) return [];
  return conflicts.flatMap((conflict) =>
    legs.flatMap((other) => {
      const { contact, direction } = other;
      if (contact.faceId !== channel.faceId || direction !== channel.direction) return [];
      if (contact.passId === pass.id || !conflict.passIds.includes(contact.passId)) return [];
      const during = intersect(other.leg, conflict);
      return during ? [{ ...by('beams-too-close', during, [other]), conflict }] : [];
    }),
  );
}

function transmitFull(
  context: PlanContext,
  { channel }: Candidate,
  legs: readonly PlanLeg[],
): Blocked[] {
  if (channel.direction !== 'transmit') return [];
  const limit = context.faces.get(channel.faceId)?.transmitBeamLimit ?? 0;
  const onFace = legs.filter(
    ({ direction, contact }) => direction === 'transmit' && contact.faceId === channel.faceId,
  );
  if (limit <= 0) return [by('transmit-limit', { fromMs: -Infinity, toMs: Infinity }, [])];
  return crowdedIntervals(onFace, limit - 1).map((crowd) =>
    by('transmit-limit', crowd, crowd.legs),
  );
}

function twice({ pass, channel }: Candidate, legs: readonly PlanLeg[]): Blocked[] {
  if (channel.direction !== 'receive') return [];
  return legs
    .filter(
      ({ direction, contact }) =>
        direction === 'receive' && contact.satelliteId === pass.satelliteId,
    )
    .map((other) => by('duplicate', other.leg, [other]));
}

/** Everything in the way of a leg of this pass on this channel, beside the given legs. */
export function blockedIntervals(
  context: PlanContext,
  candidate: Candidate,
  legs: readonly PlanLeg[],
): Blocked[] {
  const closed = closuresOf(context.day, candidate.channel).map((one) => ({
    ...by('closure', one, []),
    closure: one.closure,
  }));
  return [
    ...busy(candidate, legs),
    ...tooClose(context, candidate, legs),
    ...transmitFull(context, candidate, legs),
    ...closed,
    ...twice(candidate, legs),
  ];
}

/**
 * Where a leg of this pass may lie on this channel as far as physics go; empty where radio and channel do not fit.
 * A receive leg may overhang by the guard time where asked for.
 */
export function possibleIntervals(
  context: PlanContext,
  candidate: Candidate,
  withGuard: boolean,
): Interval[] {
  const { pass, satellite, channel } = candidate;
  const radio = radioFor(satellite, channel.direction);
  const face = context.faces.get(channel.faceId);
  if (!radio || !face || !fitsBand(face, channel.direction, radio)) return [];
  if (!fitsChannel(channel, radio)) return [];
  const overhangMs =
    withGuard && channel.direction === 'receive' ? guardMs(context.day.station, satellite) : 0;
  return context
    .windowsOf(pass.id, channel.faceId, channel.direction)
    .map((window) => widen(window, overhangMs));
}
