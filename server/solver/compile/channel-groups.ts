import type { Interval } from '../../../shared/time.ts';
import { SECOND_MS } from '../../../shared/time.ts';
import { closuresOf } from '../../../shared/schedule/closures.ts';
import type { ChannelModel, DayModel, Direction } from '../../../shared/schedule/model.ts';
import { fitsChannel, radioFor } from '../../../shared/schedule/radio-fit.ts';

/** Channels that no contact of the day can tell apart: the solver counts them and gives out the numbers afterwards. */
export interface ChannelGroup {
  index: number;
  faceId: string;
  direction: Direction;
  channels: ChannelModel[];
  setUpMs: number;
  tearDownMs: number;
  closed: Interval[];
}

/** Which of the day's radios the channel fits, as text. */
function fitSignature(day: DayModel, channel: ChannelModel): string {
  return day.satellites
    .map((satellite) => {
      const radio = radioFor(satellite, channel.direction);
      return radio && fitsChannel(channel, radio) ? '1' : '0';
    })
    .join('');
}

/**
 * Groups of interchangeable channels. Channels in `apart` stand alone: that is needed where fixed contacts on named
 * channels leave no valid numbering of a counted plan.
 */
export function channelGroups(day: DayModel, apart: ReadonlySet<string>): ChannelGroup[] {
  const groups = new Map<string, ChannelGroup>();
  for (const channel of day.channels) {
    if (!channel.inService) continue;
    const closed = closuresOf(day, channel).map(({ fromMs, toMs }) => ({ fromMs, toMs }));
    const key = [
      channel.faceId,
      channel.direction,
      channel.setUpSeconds,
      channel.tearDownSeconds,
      fitSignature(day, channel),
      closed.map(({ fromMs, toMs }) => `${fromMs}-${toMs}`).join(','),
      apart.has(channel.id) ? channel.id : '',
    ].join('|');
    const known = groups.get(key);
    if (known) {
      known.channels.push(channel);
      continue;
    }
    groups.set(key, {
      index: groups.size,
      faceId: channel.faceId,
      direction: channel.direction,
      channels: [channel],
      setUpMs: channel.setUpSeconds * SECOND_MS,
      tearDownMs: channel.tearDownSeconds * SECOND_MS,
      closed,
    });
  }
  return [...groups.values()];
}
