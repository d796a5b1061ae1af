import { describe, expect, it } from 'vitest';
import { MAP_EARTH_KM, arcAndBearing, arcAtElevation, destination } from './station-projection.ts';

const storvall = { latitudeDeg: 65.1, longitudeDeg: 22.4 };

describe('the map around the station', () => {
  it('finds the way back: destination is the inverse of arc and bearing', () => {
    for (const to of [
      { latitudeDeg: 78.2, longitudeDeg: 15.4 },
      { latitudeDeg: -33.9, longitudeDeg: 151.2 },
      { latitudeDeg: 64, longitudeDeg: -179.5 },
    ]) {
      const { arc, bearing } = arcAndBearing(storvall, to);
      const back = destination(storvall, arc, bearing);
      expect(back.latitudeDeg).toBeCloseTo(to.latitudeDeg, 9);
      expect(back.longitudeDeg).toBeCloseTo(to.longitudeDeg, 9);
    }
  });

  it('knows a quarter of a meridian: 90 degrees of latitude are 10,007.5 km on the mean sphere', () => {
    const { arc } = arcAndBearing(
      { latitudeDeg: 0, longitudeDeg: 5 },
      { latitudeDeg: 90, longitudeDeg: 5 },
    );
    expect(arc * MAP_EARTH_KM).toBeCloseTo((Math.PI / 2) * 6371, 6);
  });

  it('puts a satellite in the zenith over the station, and one on the horizon where the ray touches the sphere', () => {
    expect(arcAtElevation(90, 600)).toBeCloseTo(0, 12);
    // cos(arc) = R / (R + h) on the horizon: plane geometry of the tangent.
    expect(Math.cos(arcAtElevation(0, 600))).toBeCloseTo(6371 / 6971, 12);
    expect(arcAtElevation(10, 600)).toBeLessThan(arcAtElevation(5, 600));
  });
});
