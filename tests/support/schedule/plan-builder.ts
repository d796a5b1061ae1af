import type {
  ContactModel,
  DayModel,
  Facts,
  LegModel,
  PassModel,
} from '../../../shared/schedule/model.ts';
import { intersect, roundInward, type Interval } from '../../../shared/time.ts';

export interface ContactWish {
  id?: string;
  receive: LegModel;
  transmit?: LegModel | null;
  faceId?: string;
  locked?: boolean;
}

/** A contact of a pass as a service would build it. */
export function contactOf(day: DayModel, pass: PassModel, wish: ContactWish): ContactModel {
  const channel = day.channels.find(({ id }) => id === wish.receive.channelId);
  return {
    id: wish.id ?? `contact-${pass.id}`,
    passId: pass.id,
    predictionId: pass.predictionId,
    satelliteId: pass.satelliteId,
    missionId: pass.missionId,
    faceId: wish.faceId ?? channel?.faceId ?? 'no face',
    receive: wish.receive,
    transmit: wish.transmit ?? null,
    locked: wish.locked ?? false,
  };
}

/** The longest usable window of a pass on a face, whole seconds inside. */
export function windowOf(
  facts: Facts,
  passId: string,
  faceId: string,
  direction: 'receive' | 'transmit',
): Interval | null {
  const own = facts.windows
    .filter((one) => one.passId === passId && one.faceId === faceId && one.direction === direction)
    .sort((a, b) => b.toMs - b.fromMs - (a.toMs - a.fromMs));
  return own[0] ? roundInward(own[0]) : null;
}

/** A leg over the whole window, or over the part of it that is wanted. */
export function legOn(channelId: string, window: Interval | null, part?: Interval): LegModel {
  if (!window) throw new Error('no window to put a leg on');
  const span = part ? intersect(window, part) : window;
  if (!span) throw new Error('the part lies outside the window');
  return { channelId, ...span };
}
