/** Pointing loss, dB, of the parabolic main lobe: 12 (e / HPBW)^2 (Maral and Bousquet, from memory), to half a beamwidth. */
export const pointingLossDb = (errorDeg: number, hpbwDeg: number): number =>
  12 * (errorDeg / hpbwDeg) ** 2;

/** The same for a scanned beam: each axis with its own error and width. */
export const scannedPointingLossDb = (
  inScanPlane: { errorDeg: number; hpbwDeg: number },
  across: { errorDeg: number; hpbwDeg: number },
): number =>
  pointingLossDb(inScanPlane.errorDeg, inScanPlane.hpbwDeg) +
  pointingLossDb(across.errorDeg, across.hpbwDeg);
