/** A limit by law: which edition says so, and as of when. Local rules come before it. */
export interface LegalValue {
  value: number;
  edition: string;
  asOf: string;
}

export type RadioService = 'other' | 'space research' | 'deep space';

const RULE = 'Radio Regulations 21.14 and 21.15 (from memory); local rules come first';
const LEAST: Readonly<Record<RadioService, number>> = {
  other: 3,
  'space research': 5,
  'deep space': 10,
};

/** Least elevation of the direction of strongest radiation, deg, by service. */
export const leastTransmitElevation = (service: RadioService): LegalValue => ({
  value: LEAST[service],
  edition: RULE,
  asOf: '2020',
});

/**
 * Largest EIRP towards the horizon in bands shared with terrestrial services (Radio Regulations 21.8, from memory; the
 * same text in 47 CFR 25.204), 1 GHz and up; null: no limit above 5 deg of horizon. An example; local rules come first.
 */
export function horizonEirpLimit(
  frequencyMhz: number,
  horizonElevationDeg: number,
): { limitDbw: number | null; perBandwidth: '4kHz' | 'MHz' } {
  const high = frequencyMhz > 15_000;
  const raised = 3 * Math.max(0, horizonElevationDeg);
  return {
    limitDbw: horizonElevationDeg > 5 ? null : (high ? 64 : 40) + raised,
    perBandwidth: high ? 'MHz' : '4kHz',
  };
}
