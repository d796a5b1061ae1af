import type { FaceAxes, FaceDirection } from '../../array/face-geometry.ts';
import { directionOnAxes } from '../../array/face-geometry.ts';
import { arrayAxialRatioDb, crossPolarDiscriminationDb } from '../../array/cross-polar.ts';
import { elementLossDb, relativeGainDb, type FaceBeam } from '../../array/isolation.ts';
import { LINEAR_ON_CIRCULAR_DB } from '../../link/budget.ts';
import { dopplerHz } from '../../link/doppler.ts';
import { faceBeamPattern } from '../../link/face-radio.ts';
import { overlapDb } from '../../link/interference.ts';
import { lookAnglesOf, stateAt } from '../../orbit/track.ts';
import { unit } from '../../vector.ts';
import type { Direction, FaceModel, PassModel, RadioLinkModel, SatelliteModel } from '../model.ts';
import { radioFor } from '../radio-fit.ts';

/** A pass as a possible user of a face and direction, with what interference needs of it. */
export interface Signal {
  pass: PassModel;
  satellite: SatelliteModel;
  radio: RadioLinkModel;
  /** The beam of the face on this signal's frequency. */
  beam: FaceBeam;
}

/** Where a signal is at an instant, on the face and in frequency. */
export interface SignalState {
  at: FaceDirection;
  /** Relative level of its flux at the station, dB (EIRP and range); 0 for a beam of ours: all have equal shares. */
  levelDb: number;
  centreMhz: number;
}

/** Below this an interferer is none, dB relative to the wanted signal. */
export const NO_SIGNAL_DB = -150;

export function signalOf(
  face: FaceModel,
  direction: Direction,
  satellite: SatelliteModel,
  pass: PassModel,
): Signal | null {
  const radio = radioFor(satellite, direction);
  if (!radio) return null;
  const { scanLossExponent, scanLossTable, sidelobeFloorDb } = face;
  const pattern = faceBeamPattern(face, direction, radio.frequencyMhz);
  const beam = { pattern, scanLossExponent, scanLossTable, floorDb: sidelobeFloorDb };
  return { pass, satellite, radio, beam };
}

/**
 * State of a signal at an instant. A downlink arrives shifted by Doppler; two uplinks take the same path to the satellite
 * that hears both and are shifted alike.
 */
export function signalStateAt(
  axes: FaceAxes,
  direction: Direction,
  { pass, satellite, radio }: Signal,
): (ms: number) => SignalState {
  return (ms) => {
    const state = stateAt(pass.track, ms);
    const at = directionOnAxes(axes, unit([state.eastKm, state.northKm, state.upKm]));
    if (direction === 'transmit') return { at, levelDb: 0, centreMhz: radio.frequencyMhz };
    const { rangeKm, rangeRateKmS } = lookAnglesOf(state);
    const shiftMhz = dopplerHz(radio.frequencyMhz, rangeRateKmS) / 1e6;
    const levelDb = satellite.downlink.eirpDbw - 20 * Math.log10(rangeKm);
    return { at, levelDb, centreMhz: radio.frequencyMhz + shiftMhz };
  };
}

/** What an array's polarisation takes off an interferer at a scan angle, dB. */
export function crossPolarDb(
  wanted: RadioLinkModel,
  interferer: RadioLinkModel,
  scanAngleRad: number,
): number {
  const [a, b] = [wanted.polarisation, interferer.polarisation];
  if (a === b) return 0;
  if (a === 'linear' || b === 'linear') return LINEAR_ON_CIRCULAR_DB;
  return crossPolarDiscriminationDb(arrayAxialRatioDb(scanAngleRad));
}

/**
 * C/I of a wanted signal against one other, dB: on receive the other's flux through the wanted beam, on transmit the
 * other's beam towards the wanted satellite, where the element pattern is common to both.
 */
export function carrierToInterferenceDb(
  direction: Direction,
  wanted: { signal: Signal; state: SignalState },
  other: { signal: Signal; state: SignalState },
): number {
  const overlap = overlapDb(
    { centreMhz: wanted.state.centreMhz, widthMhz: wanted.signal.radio.bandwidthKhz / 1000 },
    { centreMhz: other.state.centreMhz, widthMhz: other.signal.radio.bandwidthKhz / 1000 },
  );
  if (overlap === null) return -NO_SIGNAL_DB;
  const { beam } = direction === 'receive' ? wanted.signal : other.signal;
  const [steered, seen] =
    direction === 'receive' ? [wanted.state.at, other.state.at] : [other.state.at, wanted.state.at];
  let gainDb = relativeGainDb(beam, steered, seen);
  if (direction === 'transmit') gainDb += elementLossDb(beam, seen) - elementLossDb(beam, steered);
  const crossDb = crossPolarDb(wanted.signal.radio, other.signal.radio, seen.scanAngleRad);
  const interferenceDb = other.state.levelDb - wanted.state.levelDb + gainDb + overlap - crossDb;
  return -Math.max(NO_SIGNAL_DB, interferenceDb);
}

/** C/I a satellite needs, dB: its own, else the face's. */
export const requiredCOverIDb = (face: FaceModel, satellite: SatelliteModel): number =>
  satellite.requiredCOverIDb ?? face.requiredIsolationDb;
