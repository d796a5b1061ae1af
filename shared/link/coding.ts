/** One mode of variable coding: its threshold Es/N0, dB, and efficiency, bit a symbol. */
export interface CodingMode {
  name: string;
  thresholdDb: number;
  bitPerSymbol: number;
}

const mode = (name: string, thresholdDb: number, bitPerSymbol: number): CodingMode => ({
  name,
  thresholdDb,
  bitPerSymbol,
});

/** DVB-S2, normal frames, no pilots, quasi error-free, ideal: ETSI EN 302 307-1 table 13. */
export const DVB_S2_MODES: readonly CodingMode[] = [
  mode('QPSK 1/4', -2.35, 0.490243),
  mode('QPSK 1/3', -1.24, 0.656448),
  mode('QPSK 2/5', -0.3, 0.789412),
  mode('QPSK 1/2', 1, 0.988858),
  mode('QPSK 3/5', 2.23, 1.188304),
  mode('QPSK 2/3', 3.1, 1.322253),
  mode('QPSK 3/4', 4.03, 1.487473),
  mode('QPSK 4/5', 4.68, 1.587196),
  mode('QPSK 5/6', 5.18, 1.654663),
  mode('QPSK 8/9', 6.2, 1.766451),
  mode('QPSK 9/10', 6.42, 1.788612),
  mode('8PSK 3/5', 5.5, 1.779991),
  mode('8PSK 2/3', 6.62, 1.980636),
  mode('8PSK 3/4', 7.91, 2.228124),
  mode('8PSK 5/6', 9.35, 2.478562),
  mode('8PSK 8/9', 10.69, 2.646012),
  mode('8PSK 9/10', 10.98, 2.679207),
  mode('16APSK 2/3', 8.97, 2.637201),
  mode('16APSK 3/4', 10.21, 2.966728),
  mode('16APSK 4/5', 11.03, 3.165623),
  mode('16APSK 5/6', 11.61, 3.300184),
  mode('16APSK 8/9', 12.89, 3.523143),
  mode('16APSK 9/10', 13.13, 3.567342),
  mode('32APSK 3/4', 12.73, 3.703295),
  mode('32APSK 4/5', 13.64, 3.951571),
  mode('32APSK 5/6', 14.28, 4.11954),
  mode('32APSK 8/9', 15.69, 4.397854),
  mode('32APSK 9/10', 16.05, 4.453027),
];

/** The most efficient mode whose threshold and margin are met; null if none. Thresholds are not in the order of efficiency. */
export const bestMode = (
  esN0Db: number,
  marginDb: number,
  modes: readonly CodingMode[] = DVB_S2_MODES,
): CodingMode | null =>
  modes.reduce<CodingMode | null>(
    (best, one) =>
      one.thresholdDb + marginDb <= esN0Db && one.bitPerSymbol > (best?.bitPerSymbol ?? 0)
        ? one
        : best,
    null,
  );
