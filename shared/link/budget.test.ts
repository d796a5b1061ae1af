import { describe, expect, it } from 'vitest';
import { inventedFace } from '../../tests/support/schedule/invented-station.ts';
import { toRadians } from '../units.ts';
import { linkBudget, type LinkSetting } from './budget.ts';
import { faceFigures } from './face-figures.ts';
import { NOISELESS_BACK_END } from './noise.ts';
import { slantGeometry } from './path.ts';
import { typicalWeather } from './weather.ts';

// The reference's station A with its cubesat (section 7, budget A; computed there with numpy): 550 km, along the boresight's
// azimuth, gas and 0.7 dB of other losses. That table takes the antenna noise from a ground share alone, 22.03 K at zenith.
const face = inventedFace('A', {
  boresightElevationDeg: 50,
  radio: { ...inventedFace('A').radio, ...NOISELESS_BACK_END, antennaNoiseK: 22.03344 },
});
const setting: LinkSetting = {
  face,
  direction: 'receive',
  radio: { frequencyMhz: 2245, polarisation: 'rhcp', rateKbps: 1000, requiredEbN0Db: 3.5 },
  farEndDb: -1,
  weather: typicalWeather(65.1, 200),
  polarisationLossDb: 0,
};
const look = (elevationDeg: number, ageDays = 0) => ({
  rangeKm: slantGeometry(550, elevationDeg).rangeKm,
  elevationDeg,
  scanAngleRad: toRadians(Math.abs(elevationDeg - 50)),
  ageDays,
});

describe('downlink budget', () => {
  it.each([
    [10, 8.5, 164.65, 70.54],
    [20, 9.32, 161.71, 74.4],
    [30, 9.8, 159.41, 77.22],
    [50, 10.17, 156.36, 80.67],
    [90, 8.81, 154.28, 81.39],
  ])('is that of the reference at %s deg', (elevationDeg, gOverT, pathLossDb, cN0DbHz) => {
    const budget = linkBudget(setting)(look(elevationDeg));
    // The table's G/T contains the scan loss; here it stands among the losses.
    expect(budget.gOverTDbK - budget.scanLossDb).toBeCloseTo(gOverT, 1);
    expect(budget.pathLossDb).toBeCloseTo(pathLossDb, 1);
    // Apart from pointing, which that table leaves out.
    expect(budget.cN0DbHz + budget.pointingLossDb).toBeCloseTo(cN0DbHz, 1);
    expect(budget.marginDb).toBeCloseTo(budget.cN0DbHz - 60 - 3.5, 9);
  });

  it('loses with old elements, rain and linear on circular, and divider noise costs G/T', () => {
    const margin = (change: Partial<LinkSetting>, ageDays = 0): number =>
      linkBudget({ ...setting, ...change })(look(20, ageDays)).marginDb;
    const fresh = margin({});
    expect(margin({}, 5)).toBeLessThan(fresh);
    expect(margin({ polarisationLossDb: 3.0103 })).toBeCloseTo(fresh - 3.0103, 9);
    const split = { ...face.radio, lnaGainDb: 20, dividerWays: 8, secondNoiseFigureDb: 6 };
    expect(margin({ face: { ...face, radio: split } })).toBeLessThan(fresh - 1);
    const ka = { ...setting.radio, frequencyMhz: 26_000 };
    expect(linkBudget({ ...setting, radio: ka })(look(20)).rainLossDb).toBeGreaterThan(1);
    expect(linkBudget(setting)(look(20)).rainLossDb).toBe(0);
  });
});

describe('uplink budget', () => {
  it('has the fixed share of the full transmit-beam limit', () => {
    const uplink = { ...setting.radio, frequencyMhz: 2067.5, rateKbps: 64, requiredEbN0Db: 9.6 };
    const at = (transmitBeamLimit: number) =>
      linkBudget({
        ...setting,
        face: { ...face, transmitBeamLimit },
        direction: 'transmit',
        radio: uplink,
        farEndDb: -28,
      })(look(50));
    // Reference, station A: 46.83475 dBW for each of four beams with 3 dB of back-off.
    expect(at(4).eirpDbw).toBeCloseTo(46.83475, 2);
    expect(at(2).eirpDbw - at(4).eirpDbw).toBeCloseTo(3.0103, 3);
  });
});

describe('face figures', () => {
  const figured = { ...face, transmitBeamLimit: 4 };

  it('warn of a grating lobe inside the normal limit at the highest frequency', () => {
    expect(faceFigures(figured, 5).grating.warning).toBeNull();
    const wide = faceFigures({ ...figured, pitchXMm: 80 }, 5).grating;
    // 80 mm at 2290 MHz are 0.6111 wavelengths: the lobe enters at asin(1 / 0.6111 - 1) = 39.53 deg.
    expect(wide.warning).toContain('39.5 deg');
    expect(wide.marginPercent).toBeLessThan(0);
  });

  it('measure the exposure distance by the limit they are given', () => {
    const limit = { limitWM2: 50, edition: 'an example', asOf: '2026-01' };
    const near = faceFigures(figured, 5, limit).transmit;
    const far = faceFigures(figured, 5).transmit;
    expect(near?.exposureLimit).toEqual(limit);
    expect((far?.exposureDistanceM ?? NaN) / (near?.exposureDistanceM ?? NaN)).toBeCloseTo(
      Math.sqrt(5),
      9,
    );
    expect(faceFigures({ ...figured, transmitBandMhz: null }, 5).transmit).toBeNull();
  });
});
