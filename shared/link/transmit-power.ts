import { powerToDb } from '../units.ts';

/** Power side of a transmit face. */
export interface TransmitAperture {
  elements: number;
  wattsPerElement: number;
  gainDbi: number;
  transmitLossDb: number;
}

/** EIRP of one beam with all the power and no back-off, dBW, at broadside. */
export const fullEirpDbw = (aperture: TransmitAperture): number =>
  powerToDb(aperture.elements * aperture.wattsPerElement) +
  aperture.gainDbi -
  aperture.transmitLossDb;

/** EIRP of each beam for shares of the power that sum to 1, dBW (common practice). */
export const sharedEirpDbw = (singleDbw: number, shares: readonly number[]): number[] =>
  shares.map((share) => singleDbw + powerToDb(share));

/**
 * EIRP of each of n equal beams, dBW, at broadside: a fixed share of the full transmit-beam limit, so that power never
 * steps during a contact. More than one carrier an amplifier needs back-off (3 to 6 dB, common practice).
 */
export const plannedEirpDbw = (
  aperture: TransmitAperture,
  { beams, backOffDb }: { beams: number; backOffDb: number },
): number => fullEirpDbw(aperture) - backOffDb - powerToDb(beams);
