import { intersect, roundInward, type Interval } from '../../time.ts';
import { blockedIntervals, possibleIntervals, type Candidate } from '../blocked.ts';
import type { PlanContext } from '../context.ts';
import { subtract } from '../intervals.ts';
import type { ChannelModel, ContactModel, LegModel, PassModel, SatelliteModel } from '../model.ts';
import type { PlanLeg } from '../plan-legs.ts';
import { lacking, servicesOf, type Service } from '../services.ts';

export interface PlacementWish {
  pass: PassModel;
  /** Legs that stand; the contact is placed beside them. */
  legs: readonly PlanLeg[];
  /** Only on these faces. */
  faceId?: string;
  /** The contact lies inside this span. */
  within?: Interval;
  /** An uplink is needed whatever the services ask. */
  needsUplink?: boolean;
}

/** What of a piece a contact of the day may use: it begins on the day, inside the wish. */
function inDay(context: PlanContext, wish: PlacementWish, piece: Interval): Interval | null {
  const { day } = context.day;
  const wanted = wish.within ? intersect(piece, wish.within) : piece;
  if (!wanted || wanted.fromMs >= day.toMs) return null;
  return intersect(wanted, { fromMs: day.fromMs, toMs: Infinity });
}

/** Whole-second pieces in which a leg can lie beside the others. */
export function freePieces(
  context: PlanContext,
  candidate: Candidate,
  legs: readonly PlanLeg[],
): Interval[] {
  const possible = possibleIntervals(context, candidate, false);
  if (possible.length === 0) return [];
  const blocked = blockedIntervals(context, candidate, legs);
  return possible.flatMap((span) =>
    subtract(span, blocked).flatMap((left) => roundInward(left) ?? []),
  );
}

const lengthMs = (span: Interval | null): number => (span ? span.toMs - span.fromMs : 0);

interface Ways {
  services: readonly Service[];
  needsUplink: boolean;
  wantsUplink: boolean;
}

/** The longest uplink inside a downlink, on any channel of its face. */
function uplinkInside(
  context: PlanContext,
  wish: PlacementWish,
  satellite: SatelliteModel,
  faceId: string,
  receive: Interval,
): LegModel | null {
  let best: LegModel | null = null;
  for (const channel of context.day.channels) {
    if (channel.faceId !== faceId || channel.direction !== 'transmit') continue;
    for (const piece of freePieces(context, { pass: wish.pass, satellite, channel }, wish.legs)) {
      const inside = intersect(piece, receive);
      if (inside && lengthMs(inside) > lengthMs(best)) best = { channelId: channel.id, ...inside };
    }
  }
  return best;
}

const acceptable = (ways: Ways, legs: { receive: LegModel; transmit: LegModel | null }): boolean =>
  (!ways.needsUplink || legs.transmit !== null) &&
  ways.services.some((service) => {
    const { receiveMs, transmitMs } = lacking(legs, service);
    return receiveMs + transmitMs === 0;
  });

function onChannel(
  context: PlanContext,
  wish: PlacementWish,
  ways: Ways,
  satellite: SatelliteModel,
  channel: ChannelModel,
): { receive: LegModel; transmit: LegModel | null }[] {
  const { pass, legs } = wish;
  return freePieces(context, { pass, satellite, channel }, legs)
    .flatMap((piece) => inDay(context, wish, piece) ?? [])
    .flatMap((piece) => {
      const receive = { channelId: channel.id, ...piece };
      const transmit = ways.wantsUplink
        ? uplinkInside(context, wish, satellite, channel.faceId, piece)
        : null;
      return [transmit, null].map((uplink) => ({ receive, transmit: uplink }));
    })
    .filter((one) => acceptable(ways, one));
}

/** The longest contact (an uplink second counting a quarter) that can be placed beside the given legs; null: none. */
export function placeContact(context: PlanContext, wish: PlacementWish): ContactModel | null {
  const { pass } = wish;
  const satellite = context.satellites.get(pass.satelliteId);
  if (!satellite) return null;
  const services = servicesOf(context.day, pass);
  const needsUplink = wish.needsUplink ?? false;
  const wantsUplink = needsUplink || services.some(({ uplink }) => uplink !== 'none');
  const ways = { services, needsUplink, wantsUplink };
  let best: ContactModel | null = null;
  let bestMs = 0;
  for (const channel of context.day.channels) {
    if (channel.direction !== 'receive') continue;
    if (wish.faceId !== undefined && channel.faceId !== wish.faceId) continue;
    for (const { receive, transmit } of onChannel(context, wish, ways, satellite, channel)) {
      const ms = lengthMs(receive) + 0.25 * lengthMs(transmit);
      if (ms <= bestMs) continue;
      bestMs = ms;
      best = contactWith(pass, channel.faceId, receive, transmit);
    }
  }
  return best;
}

/** A contact that exists in thought only; it has no identity. */
export const THOUGHT_ID = '';

export const contactWith = (
  pass: PassModel,
  faceId: string,
  receive: LegModel,
  transmit: LegModel | null,
): ContactModel => ({
  id: THOUGHT_ID,
  passId: pass.id,
  predictionId: pass.predictionId,
  satelliteId: pass.satelliteId,
  missionId: pass.missionId,
  faceId,
  receive,
  transmit,
  locked: false,
});
