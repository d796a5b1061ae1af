import { lineArrayFactor } from '../../../../shared/array/array-factor.ts';
import { pitchInWavelengths } from '../../../../shared/array/beamwidth.ts';
import { taperWeights } from '../../../../shared/array/taper.ts';
import { areCoFrequency } from '../../../../shared/schedule/radio-fit.ts';
import type { Face } from '../../../../shared/schemas/face.ts';
import type { Satellite } from '../../../../shared/schemas/satellite.ts';
import { toDegrees } from '../../../../shared/units.ts';
import { angleBetween } from '../../../../shared/vector.ts';
import { isolationOf } from './pair-isolation.ts';
import type { SkyBeam } from '../hooks/use-sky-instant.ts';

/** Two receive beams of one face on one frequency, at an instant. */
export interface BeamPair {
  a: SkyBeam;
  b: SkyBeam;
  /** C/I of the one that is worse off, as the rule judges it, and what it needs. */
  isolationDb: number;
  neededDb: number;
  /** Separation in half-power beamwidths of the u-v plane, for the eye. */
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

/** Pairs that can disturb each other at an instant, the tightest first. */
export function closePairs(
  beams: readonly SkyBeam[],
  satellites: ReadonlyMap<string, Satellite>,
  instantMs: number,
): BeamPair[] {
  return beams
    .flatMap((a, i) => beams.slice(i + 1).map((b) => [a, b] as const))
    .flatMap(([a, b]): BeamPair[] => {
      const [one, other] = [a, b].map(({ contact }) => satellites.get(contact.satelliteId));
      if (!one || !other || a.face.id !== b.face.id) return [];
      if (!areCoFrequency(one.downlink, other.downlink)) return [];
      const isolation = isolationOf(
        a.face,
        { contact: a.contact, track: a.track, satellite: one },
        { contact: b.contact, track: b.track, satellite: other },
      )?.(instantMs);
      if (!isolation) return [];
      const [du, dv] = [b.u - a.u, b.v - a.v];
      const level = patternOf(a.face, one.downlink.frequencyMhz)(du, dv);
      return [
        {
          a,
          b,
          isolationDb: isolation.db,
          neededDb: isolation.neededDb,
          hpbw: Math.hypot(du / (2 * a.widths.u), dv / (2 * a.widths.v)),
          apartDeg: toDegrees(angleBetween(a.direction, b.direction)),
          downDb: -amplitudeDb(level, a.face.sidelobeFloorDb),
        },
      ];
    })
    .sort((x, y) => x.isolationDb - x.neededDb - (y.isolationDb - y.neededDb));
}
