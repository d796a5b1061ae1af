import { DAY_MS } from '../time.ts';
import { requireInput } from './input-error.ts';
import type { Observer } from './observer.ts';
import type { HorizonMask, PassQuery } from './pass.ts';

/** The longest window of one search: the product keeps ten days ahead. */
export const LONGEST_WINDOW_DAYS = 32;

function checkWindow({ fromMs, toMs }: PassQuery): void {
  requireInput(Number.isFinite(fromMs), 'fromMs', 'the beginning of the window is not a time.');
  requireInput(Number.isFinite(toMs), 'toMs', 'the end of the window is not a time.');
  requireInput(toMs > fromMs, 'toMs', 'the window ends before it begins; swap its ends.');
  requireInput(
    toMs - fromMs <= LONGEST_WINDOW_DAYS * DAY_MS,
    'toMs',
    `the window is longer than ${LONGEST_WINDOW_DAYS} days; search it in parts.`,
  );
}

function checkObserver(observer: Observer): void {
  const { latitudeDeg, longitudeDeg, heightM, ut1MinusUtcSeconds = 0 } = observer;
  requireInput(
    Math.abs(latitudeDeg) <= 90,
    'observer.latitudeDeg',
    `${latitudeDeg} is not between -90 and 90 deg.`,
  );
  requireInput(
    Math.abs(longitudeDeg) <= 360,
    'observer.longitudeDeg',
    `${longitudeDeg} is not between -360 and 360 deg.`,
  );
  requireInput(
    heightM >= -1000 && heightM <= 20_000,
    'observer.heightM',
    `${heightM} is not between -1,000 and 20,000 m.`,
  );
  requireInput(
    Math.abs(ut1MinusUtcSeconds) <= 0.9,
    'observer.ut1MinusUtcSeconds',
    `${ut1MinusUtcSeconds} is not between -0.9 and 0.9 s, where leap seconds keep it.`,
  );
}

const isMaskElevation = (deg: number): boolean => deg >= -20 && deg < 90;

/** Throws an `OrbitInputError` for a mask that is no function of azimuth. */
export function checkMask(mask: HorizonMask): void {
  if (typeof mask === 'number') {
    requireInput(isMaskElevation(mask), 'mask', `${mask} is not between -20 and 90 deg.`);
    return;
  }
  requireInput(
    mask.length > 0,
    'mask',
    'it has no knots; give one elevation or at least one knot.',
  );
  for (const [index, [azimuthDeg, elevationDeg]] of mask.entries()) {
    const field = `mask[${index}]`;
    requireInput(
      azimuthDeg >= 0 && azimuthDeg < 360,
      field,
      `the azimuth ${azimuthDeg} is not in 0 <= azimuth < 360 deg.`,
    );
    requireInput(
      isMaskElevation(elevationDeg),
      field,
      `the elevation ${elevationDeg} is not between -20 and 90 deg.`,
    );
    const before = mask[index - 1]?.[0] ?? -1;
    requireInput(azimuthDeg !== before, field, `the azimuth ${azimuthDeg} deg stands there twice.`);
    requireInput(azimuthDeg > before, field, 'the knots are not in ascending azimuth.');
  }
}

/** Throws an `OrbitInputError` that names the field when window, observer or mask cannot be used. */
export function checkPassQuery(query: PassQuery): void {
  checkWindow(query);
  checkObserver(query.observer);
  checkMask(query.mask);
}
