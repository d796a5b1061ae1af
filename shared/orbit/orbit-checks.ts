import { DAY_MS } from '../time.ts';
import { perigeeHeightKm } from './element-ranges.ts';
import { requireInput } from './input-error.ts';
import type { Orbit } from './propagation.ts';

/**
 * The furthest an instant may lie from the epoch, days. SGP4 says nothing useful long before that, and a deep-space call
 * costs in proportion to its distance from the epoch: without a limit one old set stops the service.
 */
export const FURTHEST_FROM_EPOCH_DAYS = 400;

const REVOLUTIONS_PER_DAY = 1440 / (2 * Math.PI);

/** Throws an `OrbitInputError` for elements that describe no orbit above the ground, or lie too far from the window. */
export function checkOrbit(orbit: Orbit, fromMs: number, toMs: number): void {
  const { satrec, epochMs } = orbit;
  const { ecco, inclo, nodeo, argpo, mo, no, bstar } = satrec;
  requireInput(Number.isFinite(epochMs), 'elements.epoch', 'the epoch is not a time.');
  const angles = { inclination: inclo, raan: nodeo, argumentOfPerigee: argpo, meanAnomaly: mo };
  for (const [name, value] of Object.entries({ ...angles, bstar, meanMotion: no }))
    requireInput(Number.isFinite(value), `elements.${name}`, 'it is not a number.');
  requireInput(
    ecco >= 0 && ecco < 1,
    'elements.eccentricity',
    `${ecco} is no closed orbit; it must be at least 0 and below 1.`,
  );
  requireInput(no > 0, 'elements.meanMotion', 'it must be above 0 rev/day.');
  requireInput(
    perigeeHeightKm(no * REVOLUTIONS_PER_DAY, ecco) > 0,
    'elements.perigee',
    'mean motion and eccentricity put the perigee below the ground.',
  );
  const distanceDays = Math.max(Math.abs(fromMs - epochMs), Math.abs(toMs - epochMs)) / DAY_MS;
  requireInput(
    distanceDays <= FURTHEST_FROM_EPOCH_DAYS,
    'elements.epoch',
    `it lies ${Math.round(distanceDays)} days from the window; at most ${FURTHEST_FROM_EPOCH_DAYS} are allowed. Load a newer element set.`,
  );
}
