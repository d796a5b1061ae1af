import { channelLabel, faceLabel, satelliteName, type PlanContext } from '../context.ts';
import type { ChannelModel, FaceModel, RadioLinkModel, Violation } from '../model.ts';
import { directionWord, type PlanLeg } from '../plan-legs.ts';
import { fitsBand, fitsPolarisation, radioFor } from '../radio-fit.ts';

interface Misfit {
  words: string;
  value: number | null;
  limit: number | null;
  unit: string | null;
}
const plain = (words: string): Misfit => ({ words, value: null, limit: null, unit: null });

function radioMisfits(
  channel: ChannelModel,
  face: FaceModel,
  radio: RadioLinkModel,
  names: { satellite: string; channel: string },
): Misfit[] {
  const found: Misfit[] = [];
  if (!fitsBand(face, channel.direction, radio))
    found.push({
      words: `${names.satellite} uses ${radio.frequencyMhz} MHz, outside the ${channel.direction} band of ${face.label}`,
      value: radio.frequencyMhz,
      limit: null,
      unit: 'MHz',
    });
  if (radio.bandwidthKhz > channel.bandwidthKhz)
    found.push({
      words: `${names.satellite} needs ${radio.bandwidthKhz} kHz, channel ${names.channel} has ${channel.bandwidthKhz} kHz`,
      value: radio.bandwidthKhz,
      limit: channel.bandwidthKhz,
      unit: 'kHz',
    });
  if (!fitsPolarisation(channel.polarisation, radio.polarisation))
    found.push(
      plain(
        `${names.satellite} is ${radio.polarisation.toUpperCase()}, channel ${names.channel} is ${channel.polarisation.toUpperCase()}`,
      ),
    );
  return found;
}

function misfits(context: PlanContext, own: PlanLeg): Misfit[] {
  const { channel, satellite, direction, contact } = own;
  const names = {
    satellite: satelliteName(context, contact.satelliteId),
    channel: channelLabel(context, own.leg.channelId),
  };
  if (!channel || !satellite) return [plain('The channel or the satellite no longer exists')];
  const face = context.faces.get(channel.faceId);
  if (!face || channel.faceId !== contact.faceId)
    return [
      plain(
        `Channel ${names.channel} belongs to another face than ${faceLabel(context, contact.faceId)}`,
      ),
    ];
  if (channel.direction !== direction)
    return [plain(`Channel ${names.channel} is no ${directionWord(direction)} channel`)];
  const radio = radioFor(satellite, direction);
  if (!radio) return [plain(`${names.satellite} has no uplink radio`)];
  const outOfUse = channel.inService ? [] : [plain(`Channel ${names.channel} is not in service`)];
  return [...outOfUse, ...radioMisfits(channel, face, radio, names)];
}

/** Direction, band, bandwidth and polarisation of the channel fit the radio. */
export const judgeChannelUnfit = (context: PlanContext, legs: readonly PlanLeg[]): Violation[] =>
  legs
    .filter(({ own }) => own)
    .flatMap((own) =>
      misfits(context, own).map(({ words, value, limit, unit }) => ({
        rule: 'channel-unfit' as const,
        message: `${words}.`,
        contactIds: [own.contact.id],
        fromMs: own.leg.fromMs,
        toMs: own.leg.toMs,
        value,
        limit,
        unit,
      })),
    );
