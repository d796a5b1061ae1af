import type { BeamPattern } from '../array/array-factor.ts';
import { pitchInWavelengths } from '../array/beamwidth.ts';
import type { FaceOrientation } from '../array/face-geometry.ts';
import { apertureGainDbi } from '../array/gain.ts';
import type { ScanLossCurve } from '../array/scan-loss.ts';
import { taperEfficiency, taperWeights, type LineTaper } from '../array/taper.ts';
import { gOverTDbK, systemNoiseK, type ReceiveChain } from './noise.ts';
import type { TransmitAperture } from './transmit-power.ts';

/** Which way a link goes, seen from the station. */
export type LinkDirection = 'receive' | 'transmit';

/** A face as far as its radio side goes. */
export interface RadioFace extends FaceOrientation, ScanLossCurve {
  elementsX: number;
  elementsY: number;
  pitchXMm: number;
  pitchYMm: number;
  receiveTaper: LineTaper;
  transmitTaper: LineTaper;
  transmitBeamLimit: number;
  sidelobeFloorDb: number;
  radio: ReceiveChain & {
    radiationEfficiency: number;
    /** Antenna noise in clear sky at the zenith, K. */
    antennaNoiseK: number;
    wattsPerElement: number;
    transmitLossDb: number;
    outputBackOffDb: number;
    /** Everything else between the bands' budgets and the truth, dB. */
    otherLossDb: number;
  };
}

export const faceTaper = (face: RadioFace, direction: LinkDirection): LineTaper =>
  direction === 'receive' ? face.receiveTaper : face.transmitTaper;

/** The beam of a face at a frequency, ready for array factors. */
export function faceBeamPattern(
  face: RadioFace,
  direction: LinkDirection,
  frequencyMhz: number,
): BeamPattern {
  const taper = faceTaper(face, direction);
  const line = (elements: number, pitchMm: number) => ({
    weights: taperWeights(taper, elements),
    pitch: pitchInWavelengths(pitchMm, frequencyMhz),
  });
  return { u: line(face.elementsX, face.pitchXMm), v: line(face.elementsY, face.pitchYMm) };
}

/** Gain at broadside with taper and radiation efficiency, dBi. */
export function faceGainDbi(
  face: RadioFace,
  direction: LinkDirection,
  frequencyMhz: number,
): number {
  const { u, v } = faceBeamPattern(face, direction, frequencyMhz);
  const efficiency =
    face.radio.radiationEfficiency * taperEfficiency(u.weights) * taperEfficiency(v.weights);
  const { elementsX, elementsY } = face;
  return apertureGainDbi({ elementsX, elementsY, pitchX: u.pitch, pitchY: v.pitch }, efficiency);
}

/** G/T at broadside, dB/K, with a given antenna noise. */
export const faceGOverTDbK = (face: RadioFace, gainDbi: number, antennaK: number): number =>
  gOverTDbK(gainDbi, face.radio.feedLossDb, systemNoiseK(face.radio, antennaK));

/** Power side of the face at a frequency. */
export const faceTransmitAperture = (face: RadioFace, frequencyMhz: number): TransmitAperture => ({
  elements: face.elementsX * face.elementsY,
  wattsPerElement: face.radio.wattsPerElement,
  gainDbi: faceGainDbi(face, 'transmit', frequencyMhz),
  transmitLossDb: face.radio.transmitLossDb,
});
