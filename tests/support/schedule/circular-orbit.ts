import { toRadians } from '../../../shared/units.ts';
import type { Track } from '../../../shared/orbit/track.ts';

/** A circular orbit over a spherical, turning Earth: real enough geometry for schedules, and exactly known. */
export interface CircularOrbit {
  altitudeKm: number;
  inclinationDeg: number;
  nodeDeg: number;
  phaseDeg: number;
}

const EARTH_KM = 6371;
const MU = 398600.4418;
const EARTH_RATE_RAD_S = 7.2921159e-5;
/** Phases and nodes are given for here; days before it are as good as days after it. */
const EPOCH_MS = 20_780 * 86_400_000;

/** East, north, up, km, seen from a station on the sphere. */
function horizonKm(
  orbit: CircularOrbit,
  latitudeDeg: number,
  longitudeDeg: number,
  ms: number,
): [number, number, number] {
  const radius = EARTH_KM + orbit.altitudeKm;
  const seconds = (ms - EPOCH_MS) / 1000;
  const u = toRadians(orbit.phaseDeg) + Math.sqrt(MU / radius ** 3) * seconds;
  const i = toRadians(orbit.inclinationDeg);
  const node = toRadians(orbit.nodeDeg) - EARTH_RATE_RAD_S * seconds - toRadians(longitudeDeg);
  const [x, y, z] = [Math.cos(u), Math.sin(u) * Math.cos(i), Math.sin(u) * Math.sin(i)];
  const out = (x * Math.cos(node) - y * Math.sin(node)) * radius;
  const east = (x * Math.sin(node) + y * Math.cos(node)) * radius;
  const latitude = toRadians(latitudeDeg);
  const [dOut, dZ] = [
    out - EARTH_KM * Math.cos(latitude),
    z * radius - EARTH_KM * Math.sin(latitude),
  ];
  return [
    east,
    Math.cos(latitude) * dZ - Math.sin(latitude) * dOut,
    Math.cos(latitude) * dOut + Math.sin(latitude) * dZ,
  ];
}

export interface FoundPass {
  fromMs: number;
  toMs: number;
  tcaMs: number;
  maxElevationDeg: number;
  track: Track;
}

type Place = { latitudeDeg: number; longitudeDeg: number };

function sineOfElevation(orbit: CircularOrbit, place: Place, ms: number): number {
  const [e, n, u] = horizonKm(orbit, place.latitudeDeg, place.longitudeDeg, ms);
  return u / Math.hypot(e, n, u);
}

function trackOf(orbit: CircularOrbit, place: Place, fromMs: number, toMs: number): Track {
  const pieces = Math.max(1, Math.ceil((toMs - fromMs) / 60_000));
  const stepMs = (toMs - fromMs) / pieces;
  const at = (ms: number): [number, number, number] =>
    horizonKm(orbit, place.latitudeDeg, place.longitudeDeg, ms);
  const knots = Array.from({ length: pieces + 1 }, (_, index) => {
    const ms = fromMs + index * stepMs;
    const [before, after] = [at(ms - 50), at(ms + 50)];
    const rate = (k: 0 | 1 | 2): number => (after[k] - before[k]) * 10;
    return [...at(ms), rate(0), rate(1), rate(2)];
  }).flat();
  return { startMs: fromMs, stepMs, knots };
}

/** Passes above an elevation that touch an interval, whole, with AOS and LOS to 0.1 ms. */
export function circularPasses(
  orbit: CircularOrbit,
  place: Place,
  elevationDeg: number,
  interval: { fromMs: number; toMs: number },
): FoundPass[] {
  const excess = (ms: number): number =>
    sineOfElevation(orbit, place, ms) - Math.sin(toRadians(elevationDeg));
  const root = (upMs: number, downMs: number): number => {
    let [up, down] = [upMs, downMs];
    while (Math.abs(down - up) > 0.1) {
      const middle = (up + down) / 2;
      if (excess(middle) >= 0) up = middle;
      else down = middle;
    }
    return up;
  };
  const stepMs = orbit.altitudeKm > 5000 ? 120_000 : 20_000;
  const found: FoundPass[] = [];
  let aos: number | null = null;
  const end = interval.toMs + 12 * 3_600_000;
  for (let ms = interval.fromMs - 12 * 3_600_000; ms < end; ms += stepMs) {
    const [now, next] = [excess(ms) >= 0, excess(ms + stepMs) >= 0];
    if (!now && next) aos = root(ms + stepMs, ms);
    if (!now || next || aos === null) continue;
    const los = root(ms, ms + stepMs);
    if (los > interval.fromMs && aos < interval.toMs) found.push(passOf(orbit, place, aos, los));
    aos = null;
  }
  return found;
}

function passOf(orbit: CircularOrbit, place: Place, fromMs: number, toMs: number): FoundPass {
  let [tcaMs, best] = [fromMs, -1];
  for (let ms = fromMs; ms < toMs; ms += Math.max(500, (toMs - fromMs) / 500)) {
    const sine = sineOfElevation(orbit, place, ms);
    if (sine > best) [tcaMs, best] = [ms, sine];
  }
  const maxElevationDeg = (Math.asin(best) * 180) / Math.PI;
  return { fromMs, toMs, tcaMs, maxElevationDeg, track: trackOf(orbit, place, fromMs, toMs) };
}
