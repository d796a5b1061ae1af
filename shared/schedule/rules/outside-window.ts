import { contains, SECOND_MS, type Interval } from '../../time.ts';
import { faceLabel, satelliteName, type PlanContext } from '../context.ts';
import { guardMs } from '../holding.ts';
import { widen } from '../intervals.ts';
import type { Violation } from '../model.ts';
import { directionWord, type PlanLeg } from '../plan-legs.ts';
import { clock, spoken } from '../words.ts';

/** How far a leg sticks out of an interval, ms. */
const excessMs = (leg: Interval, allowed: Interval): number =>
  Math.max(0, allowed.fromMs - leg.fromMs) + Math.max(0, leg.toMs - allowed.toMs);

function notAtAll(context: PlanContext, own: PlanLeg): Violation {
  const { contact, leg, direction } = own;
  const name = satelliteName(context, contact.satelliteId);
  const face = faceLabel(context, contact.faceId);
  const reason = own.pass
    ? `${name} has no usable ${directionWord(direction)} window on ${face} in this pass.`
    : `The pass of ${name} at ${clock(leg.fromMs)} is no longer predicted.`;
  return {
    rule: 'outside-window',
    message: reason,
    contactIds: [contact.id],
    fromMs: leg.fromMs,
    toMs: leg.toMs,
    value: null,
    limit: null,
    unit: null,
  };
}

function beyond(context: PlanContext, own: PlanLeg, allowed: Interval): Violation {
  const { contact, leg, direction } = own;
  const name = satelliteName(context, contact.satelliteId);
  const first = Math.ceil(allowed.fromMs / SECOND_MS) * SECOND_MS;
  const last = Math.floor(allowed.toMs / SECOND_MS) * SECOND_MS;
  const excess = excessMs(leg, allowed);
  return {
    rule: 'outside-window',
    message:
      `The ${directionWord(direction)} of ${name} on ${faceLabel(context, contact.faceId)} may last from ` +
      `${clock(first)} to ${clock(last)}; ${clock(leg.fromMs)} to ${clock(leg.toMs)} is ` +
      `${spoken(Math.max(SECOND_MS, excess))} outside.`,
    contactIds: [contact.id],
    fromMs: leg.fromMs,
    toMs: leg.toMs,
    value: excess / SECOND_MS,
    limit: 0,
    unit: 's',
  };
}

/** Where a leg of this pass may lie: its windows, for a receive leg with the guard time at both ends. */
export function legLimits(context: PlanContext, own: PlanLeg): Interval[] {
  const { contact, direction, satellite } = own;
  const windows = context.windowsOf(contact.passId, contact.faceId, direction);
  const overhang =
    direction === 'receive' && satellite ? guardMs(context.day.station, satellite) : 0;
  return windows.map((window) => widen(window, overhang));
}

function judgeLeg(context: PlanContext, own: PlanLeg): Violation[] {
  const { contact, leg, direction } = own;
  const found: Violation[] = [];
  const allowed = legLimits(context, own);
  const nearest = allowed.toSorted((a, b) => excessMs(leg, a) - excessMs(leg, b))[0];
  if (!nearest) found.push(notAtAll(context, own));
  else if (excessMs(leg, nearest) > 0) found.push(beyond(context, own, nearest));
  if (direction === 'transmit' && !contains(contact.receive, leg)) {
    const name = satelliteName(context, contact.satelliteId);
    found.push({
      ...beyond(context, own, contact.receive),
      message: `The uplink of ${name}, ${clock(leg.fromMs)} to ${clock(leg.toMs)}, must lie inside its downlink, ${clock(contact.receive.fromMs)} to ${clock(contact.receive.toMs)}.`,
    });
  }
  return found;
}

/** The receive leg lies inside a usable window (it may overhang by the guard time), the transmit leg inside its own. */
export const judgeOutsideWindow = (context: PlanContext, legs: readonly PlanLeg[]): Violation[] =>
  legs.filter(({ own }) => own).flatMap((own) => judgeLeg(context, own));
