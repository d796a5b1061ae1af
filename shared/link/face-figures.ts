import { halfPowerBeamwidthRad, pitchInWavelengths } from '../array/beamwidth.ts';
import { skyCoverage } from '../array/coverage.ts';
import { onsetSpacing } from '../array/grating-lobes.ts';
import { hardEndAngleRad } from '../array/hard-end.ts';
import { scanAngleForLoss } from '../array/scan-loss.ts';
import { sidelobesDb } from '../array/sidelobes.ts';
import { wavelengthM } from '../array/wavelength.ts';
import { toDegrees } from '../units.ts';
import { apertureFields, exposureDistanceM, exposureLevels } from './exposure.ts';
import {
  faceBeamPattern,
  faceGainDbi,
  faceGOverTDbK,
  faceTaper,
  faceTransmitAperture,
  type LinkDirection,
  type RadioFace,
} from './face-radio.ts';
import { systemNoiseK } from './noise.ts';
import { fullEirpDbw, plannedEirpDbw } from './transmit-power.ts';

/** A face as its page shows it. */
export interface FiguredFace extends RadioFace {
  normalLimitDb: number;
  hardEndDb: number;
  receiveBandMhz: readonly [number, number];
  transmitBandMhz: readonly [number, number] | null;
}

/** A limit of power density, W/m2, with the edition it comes from and the date it was set here. Local rules come first. */
export interface ExposureLimit {
  limitWM2: number;
  edition: string;
  asOf: string;
}

/** Example for the public; every station sets its own. */
export const EXAMPLE_EXPOSURE_LIMIT: ExposureLimit = {
  limitWM2: exposureLevels(2067.5, false).wholeBodyWM2,
  edition: exposureLevels(2067.5, false).edition,
  asOf: '2020-03',
};

const middle = ([from, to]: readonly [number, number]): number => (from + to) / 2;

/** Half-power widths, deg, in both planes; null where the far edge leaves the visible region. */
function widthsDeg(
  face: RadioFace,
  direction: LinkDirection,
  frequencyMhz: number,
  scanRad: number,
) {
  const taper = faceTaper(face, direction);
  const width = (elements: number, pitchMm: number): number | null => {
    const rad = halfPowerBeamwidthRad({ elements, pitchMm, taper }, frequencyMhz, scanRad);
    return rad === null ? null : toDegrees(rad);
  };
  return { uDeg: width(face.elementsX, face.pitchXMm), vDeg: width(face.elementsY, face.pitchYMm) };
}

function receiveFigures(face: FiguredFace, scanRad: number) {
  const frequencyMhz = middle(face.receiveBandMhz);
  const gainDbi = faceGainDbi(face, 'receive', frequencyMhz);
  const { u } = faceBeamPattern(face, 'receive', frequencyMhz);
  return {
    frequencyMhz,
    gainDbi,
    broadsideHpbw: widthsDeg(face, 'receive', frequencyMhz, 0),
    hpbwAtLimit: widthsDeg(face, 'receive', frequencyMhz, scanRad),
    firstSidelobeDb: sidelobesDb(u).firstDb,
    systemNoiseK: systemNoiseK(face.radio, face.radio.antennaNoiseK),
    gOverTDbK: faceGOverTDbK(face, gainDbi, face.radio.antennaNoiseK),
  };
}

function transmitFigures(face: FiguredFace, limit: ExposureLimit) {
  if (!face.transmitBandMhz || face.transmitBeamLimit < 1 || face.radio.wattsPerElement <= 0)
    return null;
  const frequencyMhz = middle(face.transmitBandMhz);
  const aperture = faceTransmitAperture(face, frequencyMhz);
  const powerW = aperture.elements * aperture.wattsPerElement;
  const areaM2 = (aperture.elements * face.pitchXMm * face.pitchYMm) / 1e6;
  const eirpOneBeamDbw = fullEirpDbw(aperture);
  const share = { beams: face.transmitBeamLimit, backOffDb: face.radio.outputBackOffDb };
  const fields = apertureFields({
    powerW,
    areaM2,
    wavelengthM: wavelengthM(frequencyMhz),
    efficiency: face.radio.radiationEfficiency,
  });
  return {
    frequencyMhz,
    gainDbi: aperture.gainDbi,
    powerW,
    eirpOneBeamDbw,
    eirpEachBeamDbw: plannedEirpDbw(aperture, share),
    beams: face.transmitBeamLimit,
    surfaceWM2: fields.surfaceWM2,
    /** All the power in one beam that stands still: the worst case. */
    exposureDistanceM: exposureDistanceM(eirpOneBeamDbw, limit.limitWM2),
    exposureLimit: limit,
  };
}

function gratingFigures(face: FiguredFace, limitDeg: number) {
  const highestMhz = Math.max(face.receiveBandMhz[1], face.transmitBandMhz?.[1] ?? 0);
  const spacing = pitchInWavelengths(Math.max(face.pitchXMm, face.pitchYMm), highestMhz);
  const onset = onsetSpacing(limitDeg);
  const marginPercent = 100 * (onset / spacing - 1);
  const entersDeg = toDegrees(hardEndAngleRad({ ...face, hardEndDb: Infinity }, highestMhz));
  const warning =
    marginPercent >= 0
      ? null
      : `A grating lobe comes into sight at ${entersDeg.toFixed(1)} deg of scan at ${highestMhz} MHz, inside the normal limit.`;
  return { highestMhz, spacing, onsetSpacing: onset, marginPercent, warning };
}

/**
 * Everything a station page derives from a face: gain, widths, G/T and EIRP at the middles of its bands, scan angle and
 * sky at the normal limit, room before a grating lobe at the highest frequency, distance to a power-density limit at full load.
 */
export function faceFigures(
  face: FiguredFace,
  elevationFloorDeg: number,
  limit: ExposureLimit = EXAMPLE_EXPOSURE_LIMIT,
) {
  const scanRad = scanAngleForLoss(face, face.normalLimitDb);
  const scanAngleAtLimitDeg = toDegrees(scanRad);
  const boresight = {
    azimuthDeg: face.boresightAzimuthDeg,
    elevationDeg: face.boresightElevationDeg,
  };
  return {
    elements: face.elementsX * face.elementsY,
    receive: receiveFigures(face, scanRad),
    transmit: transmitFigures(face, limit),
    scanAngleAtLimitDeg,
    scanAngleAtHardEndDeg: toDegrees(hardEndAngleRad(face, face.receiveBandMhz[1])),
    skyCoverage: skyCoverage([boresight], scanAngleAtLimitDeg, elevationFloorDeg),
    grating: gratingFigures(face, scanAngleAtLimitDeg),
  };
}
export type FaceFigures = ReturnType<typeof faceFigures>;
