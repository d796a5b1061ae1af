import type {
  ChannelModel,
  Direction,
  FaceModel,
  Polarisation,
  RadioLinkModel,
  SatelliteModel,
} from './model.ts';

/** The satellite's radio in a direction of ours: its downlink is what we receive. */
export const radioFor = (satellite: SatelliteModel, direction: Direction): RadioLinkModel | null =>
  direction === 'receive' ? satellite.downlink : satellite.uplink;

export const bandOf = (face: FaceModel, direction: Direction): [number, number] | null =>
  direction === 'receive' ? face.receiveBandMhz : face.transmitBandMhz;

/** The whole occupied bandwidth lies in the band of the face. */
export function fitsBand(face: FaceModel, direction: Direction, radio: RadioLinkModel): boolean {
  const band = bandOf(face, direction);
  if (!band) return false;
  const halfMhz = radio.bandwidthKhz / 2000;
  return radio.frequencyMhz - halfMhz >= band[0] && radio.frequencyMhz + halfMhz <= band[1];
}

/** Opposite circular senses do not fit; linear on circular does, with its loss in the link margin. */
export function fitsPolarisation(channel: Polarisation | 'both', radio: Polarisation): boolean {
  if (channel === 'both' || channel === 'linear' || radio === 'linear') return true;
  return channel === radio;
}

export const fitsChannel = (channel: ChannelModel, radio: RadioLinkModel): boolean =>
  channel.inService &&
  fitsPolarisation(channel.polarisation, radio.polarisation) &&
  radio.bandwidthKhz <= channel.bandwidthKhz;

/** Two radios that can disturb each other: occupied bandwidths overlap and the senses are not opposite circular. */
export function areCoFrequency(a: RadioLinkModel, b: RadioLinkModel): boolean {
  const apartKhz = Math.abs(a.frequencyMhz - b.frequencyMhz) * 1000;
  return (
    apartKhz < (a.bandwidthKhz + b.bandwidthKhz) / 2 &&
    fitsPolarisation(a.polarisation, b.polarisation)
  );
}
