import { halfPowerBeamwidthRad } from '../array/beamwidth.ts';
import { elementLossDb } from '../array/isolation.ts';
import { powerToDb, toDegrees } from '../units.ts';
import { carrierToNoiseDensityDb } from './carrier.ts';
import { alongTrackErrorKm, TYPICAL_AGING, worstPointingErrorDeg } from './element-age.ts';
import {
  faceGainDbi,
  faceTaper,
  faceTransmitAperture,
  type LinkDirection,
  type RadioFace,
} from './face-radio.ts';
import { gasLossDb, zenithGasDb } from './gas.ts';
import { GROUND_SHARE, gOverTDbK, skyNoiseK, systemNoiseK } from './noise.ts';
import { freeSpaceLossDb } from './path.ts';
import { pointingLossDb } from './pointing.ts';
import { rainLoss } from './rain.ts';
import { plannedEirpDbw } from './transmit-power.ts';
import type { LinkWeather } from './weather.ts';

/** The other end of a link: EIRP of a downlink, G/T of an uplink. */
export interface LinkEnd {
  frequencyMhz: number;
  polarisation: 'rhcp' | 'lhcp' | 'linear';
  rateKbps: number;
  requiredEbN0Db: number;
}

export interface LinkSetting {
  face: RadioFace;
  direction: LinkDirection;
  radio: LinkEnd;
  /** EIRP, dBW, of the satellite to receive; its G/T, dB/K, to transmit. */
  farEndDb: number;
  weather: LinkWeather;
  polarisationLossDb: number;
}

/** Where the satellite is, and how old the elements are that point the beam. */
export interface LinkLook {
  rangeKm: number;
  elevationDeg: number;
  scanAngleRad: number;
  ageDays: number;
}

/** A link with its terms; losses positive dB. */
export interface LinkBudget {
  eirpDbw: number;
  gOverTDbK: number;
  pathLossDb: number;
  gasLossDb: number;
  rainLossDb: number;
  scanLossDb: number;
  polarisationLossDb: number;
  pointingLossDb: number;
  otherLossDb: number;
  cN0DbHz: number;
  ebN0Db: number;
  marginDb: number;
}

/** Rain counts for nothing below this, MHz (common practice for S band). */
const RAIN_FROM_MHZ = 3000;
const CIRCULAR_TILT_DEG = 45;

/** What one end of a link has at broadside: EIRP or G/T as a function of the air's attenuation. */
function stationEnd({ face, direction, radio, farEndDb }: LinkSetting) {
  if (direction === 'transmit') {
    const aperture = faceTransmitAperture(face, radio.frequencyMhz);
    const share = {
      beams: Math.max(1, face.transmitBeamLimit),
      backOffDb: face.radio.outputBackOffDb,
    };
    const eirpDbw = plannedEirpDbw(aperture, share);
    return () => ({ eirpDbw, gOverTDbK: farEndDb });
  }
  const gainDbi = faceGainDbi(face, 'receive', radio.frequencyMhz);
  const zenithK = skyNoiseK(zenithGasDb(radio.frequencyMhz));
  // System noise is linear in antenna noise; asked thousands of times a day, so its two numbers are kept.
  const chainK = systemNoiseK(face.radio, 0);
  const share = systemNoiseK(face.radio, 1) - chainK;
  return (airLossDb: number) => {
    // The stated antenna noise is that of clear sky at the zenith; what the air adds comes on top.
    const addedK = (1 - GROUND_SHARE) * (skyNoiseK(airLossDb) - zenithK);
    const systemK = chainK + share * (face.radio.antennaNoiseK + addedK);
    return { eirpDbw: farEndDb, gOverTDbK: gOverTDbK(gainDbi, face.radio.feedLossDb, systemK) };
  };
}

/** Narrower half-power width of the beam at broadside, deg: the safe side for pointing errors. */
function narrowWidthDeg({ face, direction, radio }: LinkSetting): number {
  const taper = faceTaper(face, direction);
  const width = (elements: number, pitchMm: number): number =>
    halfPowerBeamwidthRad({ elements, pitchMm, taper }, radio.frequencyMhz, 0) ?? Math.PI;
  return toDegrees(
    Math.min(width(face.elementsX, face.pitchXMm), width(face.elementsY, face.pitchYMm)),
  );
}

/**
 * A link budget to be asked at many places of a pass. Downlink: G/T from the face's noise data, antenna noise growing
 * towards the horizon and with rain, divider noise. Uplink: the fixed share of the face's full transmit-beam limit, back-off
 * included. Scan loss, free space, gas, rain at the availability, polarisation, pointing with the age of the elements, and
 * the face's other losses. Sources in the modules it calls; gas and rain are held at 5 deg below it.
 */
export function linkBudget(setting: LinkSetting): (look: LinkLook) => LinkBudget {
  const { face, radio, weather, polarisationLossDb } = setting;
  const { frequencyMhz } = radio;
  const stationAt = stationEnd(setting);
  const zenithDb = zenithGasDb(frequencyMhz);
  const hpbwDeg = narrowWidthDeg(setting);
  const rateDb = powerToDb(radio.rateKbps * 1000);
  const rainAt = (elevationDeg: number): number => {
    if (frequencyMhz < RAIN_FROM_MHZ) return 0;
    const path = {
      frequencyMhz,
      elevationDeg: Math.max(5, elevationDeg),
      tiltDeg: CIRCULAR_TILT_DEG,
    };
    return rainLoss(weather.rain, path, weather.unavailablePercent).lossDb;
  };
  return ({ rangeKm, elevationDeg, scanAngleRad, ageDays }) => {
    const pathLossDb = freeSpaceLossDb(frequencyMhz, rangeKm);
    const airGasDb = gasLossDb(zenithDb, elevationDeg);
    const rainLossDb = rainAt(elevationDeg);
    const scanLossDb = elementLossDb(face, { scanAngleRad });
    const errorDeg = worstPointingErrorDeg(alongTrackErrorKm(TYPICAL_AGING, ageDays), rangeKm);
    const pointingDb = pointingLossDb(errorDeg, hpbwDeg);
    const { otherLossDb } = face.radio;
    const losses =
      pathLossDb +
      airGasDb +
      rainLossDb +
      scanLossDb +
      polarisationLossDb +
      pointingDb +
      otherLossDb;
    const { eirpDbw, gOverTDbK: gOverT } = stationAt(airGasDb + rainLossDb);
    const cN0DbHz = carrierToNoiseDensityDb(eirpDbw, losses, gOverT);
    const ebN0 = cN0DbHz - rateDb;
    return {
      eirpDbw,
      gOverTDbK: gOverT,
      pathLossDb,
      gasLossDb: airGasDb,
      rainLossDb,
      scanLossDb,
      polarisationLossDb,
      pointingLossDb: pointingDb,
      otherLossDb,
      cN0DbHz,
      ebN0Db: ebN0,
      marginDb: ebN0 - radio.requiredEbN0Db,
    };
  };
}

/** Linear on circular, either way round: half the power, dB. */
export const LINEAR_ON_CIRCULAR_DB = powerToDb(2);
