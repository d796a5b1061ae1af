import type { ChannelModel, DayModel, Violation } from '../../shared/schedule/model.ts';
import { finding } from './finding.ts';
import type { Suspect } from './legs.ts';

/** First and last instant that a leg takes of its channel. */
function held({ leg, direction, satellite }: Suspect, channel: ChannelModel): [number, number] {
  const early = direction === 'receive' ? (satellite?.timeUncertaintySeconds ?? 0) : 0;
  return [
    leg.fromMs - 1000 * (early + channel.setUpSeconds),
    leg.toMs + 1000 * (early + channel.tearDownSeconds),
  ];
}

function checkBusy(suspects: readonly Suspect[]): Violation[] {
  const found: Violation[] = [];
  for (const [index, a] of suspects.entries())
    for (const b of suspects.slice(index + 1)) {
      if (a.leg.channelId !== b.leg.channelId || (!a.own && !b.own) || !a.channel) continue;
      const [[fromA, toA], [fromB, toB]] = [held(a, a.channel), held(b, a.channel)];
      if (fromA < toB && fromB < toA)
        found.push(
          finding(
            'channel-busy',
            `channel ${a.channel.label} twice`,
            [a, b],
            Math.max(fromA, fromB),
            Math.min(toA, toB),
          ),
        );
    }
  return found;
}

/** Why a channel cannot carry the leg; null when it can. */
function misfit({ channel, contact, direction, satellite, face }: Suspect): string | null {
  const radio = direction === 'receive' ? satellite?.downlink : satellite?.uplink;
  if (!channel || !face || !radio) return 'channel, face or radio missing';
  if (channel.faceId !== contact.faceId) return 'channel of another face';
  if (channel.direction !== direction || !channel.inService) return 'channel of no use';
  const band = direction === 'receive' ? face.receiveBandMhz : face.transmitBandMhz;
  const half = radio.bandwidthKhz / 2000;
  if (!band || radio.frequencyMhz - half < band[0] || radio.frequencyMhz + half > band[1])
    return 'outside the band of the face';
  if (radio.bandwidthKhz > channel.bandwidthKhz) return 'too wide for the channel';
  const senses = `${channel.polarisation}-${radio.polarisation}`;
  return senses === 'rhcp-lhcp' || senses === 'lhcp-rhcp' ? 'opposite polarisation' : null;
}

function checkClosures(day: DayModel, suspect: Suspect): Violation[] {
  const { leg, contact, direction } = suspect;
  return day.closures
    .filter(({ scope, scopeId, reducedByDb, direction: closed }) => {
      const ids = { station: day.station.id, face: contact.faceId, channel: leg.channelId };
      return (
        reducedByDb === null &&
        ids[scope] === scopeId &&
        (closed === 'both' || closed === direction)
      );
    })
    .filter(({ fromMs, toMs }) => leg.fromMs < (toMs ?? Infinity) && fromMs < leg.toMs)
    .map(({ reason }) => finding('closure', `closed (${reason})`, [suspect], leg.fromMs, leg.toMs));
}

/** Channels one leg at a time, fitting, open; transmit beams of a face counted at every start. */
export function checkChannels(day: DayModel, suspects: readonly Suspect[]): Violation[] {
  const own = suspects.filter((suspect) => suspect.own);
  const unfit = own.flatMap((suspect) => {
    const words = misfit(suspect);
    return words
      ? [finding('channel-unfit', words, [suspect], suspect.leg.fromMs, suspect.leg.toMs)]
      : [];
  });
  return [
    ...checkBusy(suspects),
    ...unfit,
    ...own.flatMap((suspect) => checkClosures(day, suspect)),
    ...checkTransmitLimit(suspects),
  ];
}

function checkTransmitLimit(suspects: readonly Suspect[]): Violation[] {
  const uplinks = suspects.filter(({ direction }) => direction === 'transmit');
  return uplinks.flatMap((first) => {
    const ms = first.leg.fromMs;
    const on = uplinks.filter(
      ({ contact, leg }) =>
        contact.faceId === first.contact.faceId && leg.fromMs <= ms && ms < leg.toMs,
    );
    if (on.length <= (first.face?.transmitBeamLimit ?? 0) || !on.some(({ own }) => own)) return [];
    return [finding('transmit-limit', `${on.length} uplinks at once`, on, ms, ms + 1)];
  });
}
