import { lineArrayFactor } from '../../../../shared/array/array-factor.ts';
import { pitchInWavelengths } from '../../../../shared/array/beamwidth.ts';
import { taperWeights } from '../../../../shared/array/taper.ts';
import { areCoFrequency } from '../../../../shared/schedule/radio-fit.ts';
import type { Face } from '../../../../shared/schemas/face.ts';
import type { Satellite } from '../../../../shared/schemas/satellite.ts';
import { toDegrees } from '../../../../shared/units.ts';
import { angleBetween } from '../../../../shared/vector.ts';
import type { SkyBeam } from '../hooks/use-sky-instant.ts';

/** Two receive beams of one face on one frequency, at an instant. */
export interface BeamPair {
  a: SkyBeam;
  b: SkyBeam;
  /** Separation in half-power beamwidths of the u-v plane: what the rule judges. */
  hpbw: number;
  apartDeg: number;
  /** How far one beam's pattern has fallen at the other's centre, dB (array factor, receive taper). */
  downDb: number;
}

/** Amplitude of a face's receive pattern at a distance in direction cosines from the beam's centre. */
export function patternOf(face: Face, frequencyMhz: number): (du: number, dv: number) => number {
  const along = (elements: number, pitchMm: number): ((d: number) => number) => {
    const weights = taperWeights(face.receiveTaper, elements);
    const pitch = pitchInWavelengths(pitchMm, frequencyMhz);
    return (d) => lineArrayFactor(weights, pitch, d);
  };
  const x = along(face.elementsX, face.pitchXMm);
  const y = along(face.elementsY, face.pitchYMm);
  return (du, dv) => x(du) * y(dv);
}

/** Decibels of an amplitude, not below the face's sidelobe floor. */
export const amplitudeDb = (amplitude: number, floorDb: number): number =>
  Math.max(floorDb, 20 * Math.log10(Math.max(1e-9, Math.abs(amplitude))));

/** Pairs that can disturb each other, nearest first. */
export function closePairs(
  beams: readonly SkyBeam[],
  satellites: ReadonlyMap<string, Satellite>,
): BeamPair[] {
  const pairs: BeamPair[] = [];
  for (const [i, a] of beams.entries())
    for (const b of beams.slice(i + 1)) {
      const [radioA, radioB] = [a, b].map(
        ({ contact }) => satellites.get(contact.satelliteId)?.downlink,
      );
      if (!radioA || !radioB || a.face.id !== b.face.id || !areCoFrequency(radioA, radioB))
        continue;
      const [du, dv] = [b.u - a.u, b.v - a.v];
      const down = patternOf(a.face, radioA.frequencyMhz)(du, dv);
      pairs.push({
        a,
        b,
        hpbw: Math.hypot(du / (2 * a.widths.u), dv / (2 * a.widths.v)),
        apartDeg: toDegrees(angleBetween(a.direction, b.direction)),
        downDb: -amplitudeDb(down, a.face.sidelobeFloorDb),
      });
    }
  return pairs.sort((x, y) => x.hpbw - y.hpbw);
}
