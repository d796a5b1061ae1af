import type { FaceDirection } from '../array/face-geometry.ts';
import { elementLossDb, relativeGainDb, type FaceBeam } from '../array/isolation.ts';
import { dbToPower, powerToDb } from '../units.ts';

/** One more signal on the frequency of the wanted one, as it meets the wanted beam. */
export interface Interferer {
  at: FaceDirection;
  /** Power relative to the wanted signal, dB: flux at the station, or power of the beam; overlap and polarisation included. */
  relativeDb: number;
}

/**
 * Receive C/I of a wanted beam, dB: the others' flux through the wanted beam's pattern, element ratio and floor included.
 * Infinity without others.
 */
export const receiveCarrierToInterferenceDb = (
  beam: FaceBeam,
  wanted: FaceDirection,
  others: readonly Interferer[],
): number =>
  -powerToDb(
    others.reduce(
      (sum, { at, relativeDb }) => sum + dbToPower(relativeDb + relativeGainDb(beam, wanted, at)),
      0,
    ),
  );

/**
 * Transmit C/I at the wanted satellite, dB: the other beams' patterns in its direction. The element pattern is the same
 * for all of them there and cancels.
 */
export const transmitCarrierToInterferenceDb = (
  beam: FaceBeam,
  wanted: FaceDirection,
  others: readonly Interferer[],
): number =>
  -powerToDb(
    others.reduce((sum, { at, relativeDb }) => {
      const towardsWantedDb =
        relativeGainDb(beam, at, wanted) - elementLossDb(beam, at) + elementLossDb(beam, wanted);
      return sum + dbToPower(relativeDb + towardsWantedDb);
    }, 0),
  );

/** Occupied band of a signal, MHz. */
export interface OccupiedBand {
  centreMhz: number;
  widthMhz: number;
}

/** Share of the interferer's power that falls into the victim's band, of flat spectra, dB; null where they do not meet. */
export function overlapDb(victim: OccupiedBand, interferer: OccupiedBand): number | null {
  const reach = (victim.widthMhz + interferer.widthMhz) / 2;
  const common = Math.min(
    reach - Math.abs(victim.centreMhz - interferer.centreMhz),
    victim.widthMhz,
    interferer.widthMhz,
  );
  return common <= 0 ? null : powerToDb(common / interferer.widthMhz);
}
