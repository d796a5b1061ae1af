import { dbToPower, powerToDb } from '../units.ts';

/** 10 log10 of Boltzmann's constant, dBW/K/Hz (exact SI value). */
export const BOLTZMANN_DBW = powerToDb(1.380649e-23);

/** C/N0, dBHz (link equation, Maral and Bousquet, from memory): scan loss stands among the losses, never in G/T too. */
export const carrierToNoiseDensityDb = (
  eirpDbw: number,
  lossesDb: number,
  gOverT: number,
): number => eirpDbw - lossesDb + gOverT - BOLTZMANN_DBW;

/** Eb/N0, dB, at a bit rate. */
export const ebN0Db = (cN0DbHz: number, bitRateBps: number): number =>
  cN0DbHz - powerToDb(bitRateBps);

/** A modulated carrier: symbol rate, bit a symbol, roll-off. */
export function modulatedCarrier(
  cN0DbHz: number,
  {
    symbolRate,
    bitPerSymbol,
    rollOff,
  }: { symbolRate: number; bitPerSymbol: number; rollOff: number },
) {
  const bitRateBps = symbolRate * bitPerSymbol;
  return {
    esN0Db: cN0DbHz - powerToDb(symbolRate),
    ebN0Db: ebN0Db(cN0DbHz, bitRateBps),
    bitRateBps,
    bandwidthHz: symbolRate * (1 + rollOff),
  };
}

/** Noise and interference together: ratios on the same bandwidth, dB. */
export const withInterferenceDb = (
  carrierToNoiseDb: number,
  carrierToInterferenceDb: number,
): number => -powerToDb(dbToPower(-carrierToNoiseDb) + dbToPower(-carrierToInterferenceDb));
