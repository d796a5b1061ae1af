/**
 * The pass search against skyfield: 12 invented sets, two stations, masks 0, 5 and 10 deg, two days (the method and the
 * rounding are in the header of the reference file: times 1 ms, angles 1e-4 and 1e-5 deg, range 1e-4 km).
 */
import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { searchPasses, type PredictedPass } from '../../shared/orbit/pass-search.ts';
import { fromIso } from '../../shared/time.ts';
import { toRadians } from '../../shared/units.ts';

interface ReferenceBlock {
  aos: string;
  tca: string;
  los: string;
  max_elevation_deg: number;
  azimuth_aos_deg: number;
  azimuth_tca_deg: number;
  azimuth_los_deg: number;
  range_tca_km: number;
}

interface ReferencePass extends ReferenceBlock {
  catalog_number: number;
  station: string;
  mask_deg: number;
  truncated_at_start: boolean;
  truncated_at_end: boolean;
  elevation_rate_aos_deg_s: number;
  elevation_rate_los_deg_s: number;
  ut1_equals_utc: ReferenceBlock;
}

interface Reference {
  header: { window_utc: [string, string] };
  satellites: { catalog_number: number; kind: string; line1: string; line2: string }[];
  stations: { name: string; latitude_deg: number; longitude_deg: number; height_m: number }[];
  passes: ReferencePass[];
}

const path = new URL('./fixtures/orbit/reference-passes.json', import.meta.url);
const reference = JSON.parse(readFileSync(path, 'utf8')) as Reference;
const [fromMs = NaN, toMs = NaN] = reference.header.window_utc.map(fromIso);

/** Revolutions a day above which an orbit is low: the reference compares TCA times for these only. */
const LOW_ORBIT_REV_PER_DAY = 11;
/** UT1 - UTC of the reference's primary blocks, in the middle of its window; it drifts 0.0002 s either way. */
const PRIMARY_UT1_MINUS_UTC_S = 0.42613;

interface Pair {
  want: ReferencePass;
  got: PredictedPass;
  isLow: boolean;
}

/** Every reference pass with the pass found for it; throws off when a list has another length. */
function pairs(ut1MinusUtcSeconds: number): Pair[] {
  return reference.satellites.flatMap((satellite) =>
    reference.stations.flatMap((station) =>
      [0, 5, 10].flatMap((mask) => {
        const want = reference.passes.filter(
          (pass) =>
            pass.catalog_number === satellite.catalog_number &&
            pass.station === station.name &&
            pass.mask_deg === mask,
        );
        const { passes } = searchPasses({
          elements: satellite,
          observer: {
            latitudeDeg: station.latitude_deg,
            longitudeDeg: station.longitude_deg,
            heightM: station.height_m,
            ut1MinusUtcSeconds,
          },
          mask,
          fromMs,
          toMs,
        });
        expect(passes.length, `${satellite.catalog_number} ${station.name} ${mask}`).toBe(
          want.length,
        );
        const isLow = Number(satellite.line2.slice(52, 63)) > LOW_ORBIT_REV_PER_DAY;
        return want.flatMap((pass, index) => {
          const got = passes[index];
          return got ? [{ want: pass, got, isLow }] : [];
        });
      }),
    ),
  );
}

const onSky = (aDeg: number, bDeg: number, elevationDeg: number): number => {
  const turn = Math.abs(aDeg - bDeg) % 360;
  return Math.min(turn, 360 - turn) * Math.cos(toRadians(elevationDeg));
};

describe('passes against the reference with UT1 = UTC', () => {
  const found = pairs(0);

  it('finds all 682 and none more', () => expect(found).toHaveLength(682));

  it('has AOS and LOS within 2 ms and low TCA within 5 ms', () => {
    for (const { want, got, isLow } of found) {
      const exact = want.ut1_equals_utc;
      expect(Math.abs(got.aosMs - fromIso(exact.aos))).toBeLessThanOrEqual(2);
      expect(Math.abs(got.losMs - fromIso(exact.los))).toBeLessThanOrEqual(2);
      if (isLow) expect(Math.abs(got.tcaMs - fromIso(exact.tca))).toBeLessThanOrEqual(5);
    }
  });

  it('has the highest elevation within 1e-4 deg and directions within 0.002 deg', () => {
    for (const { want, got, isLow } of found) {
      const exact = want.ut1_equals_utc;
      const top = exact.max_elevation_deg;
      expect(Math.abs(got.maxElevationDeg - top)).toBeLessThanOrEqual(1e-4);
      const mask = want.mask_deg;
      expect(onSky(got.aosAzimuthDeg, exact.azimuth_aos_deg, mask)).toBeLessThan(0.002);
      expect(onSky(got.losAzimuthDeg, exact.azimuth_los_deg, mask)).toBeLessThan(0.002);
      // At another instant of a flat maximum azimuth and range differ too.
      if (!isLow) continue;
      expect(onSky(got.tcaAzimuthDeg, exact.azimuth_tca_deg, top)).toBeLessThan(0.002);
      expect(Math.abs(got.tcaRangeKm - exact.range_tca_km)).toBeLessThan(0.05);
    }
  });

  it('marks what the window cuts', () => {
    for (const { want, got } of found) {
      expect(got.startsBefore).toBe(want.truncated_at_start);
      expect(got.endsAfter).toBe(want.truncated_at_end);
    }
  });
});

describe('passes against the reference with UT1 - UTC set', () => {
  // What is left is the drift of the reference's UT1 - UTC, 0.0002 s: that times the speed in the sky, and rounding.
  it('agrees with the primary blocks to 1e-4 deg at AOS and LOS', () => {
    for (const { want, got } of pairs(PRIMARY_UT1_MINUS_UTC_S)) {
      const [aosS, losS] = [got.aosMs - fromIso(want.aos), got.losMs - fromIso(want.los)];
      const { elevation_rate_aos_deg_s: rising, elevation_rate_los_deg_s: falling } = want;
      if (!want.truncated_at_start) expect(Math.abs(aosS * rising) / 1000).toBeLessThan(1e-4);
      if (!want.truncated_at_end) expect(Math.abs(losS * falling) / 1000).toBeLessThan(1e-4);
      expect(Math.abs(got.maxElevationDeg - want.max_elevation_deg)).toBeLessThan(1e-4);
    }
  });

  it('would miss them by more than 100 ms without it', () => {
    const worst = Math.max(
      ...pairs(0).map(({ want, got }) => Math.abs(got.aosMs - fromIso(want.aos))),
    );
    expect(worst).toBeGreaterThan(100);
  });
});
