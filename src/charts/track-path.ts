import { directionAt, type Track } from '../../shared/orbit/track.ts';
import { MINUTE_MS, type Interval } from '../../shared/time.ts';
import { directionPoint, pathThrough, type Point } from './polar.ts';

/** A pass on the sky sheet. */
export interface SkyTrack extends Interval {
  id: string;
  /** CSS colour of its mission; null: it has no contact. */
  color: string | null;
  dashed?: boolean;
  track: Track;
  /** Parts of the pass that are contacts. */
  contacts: readonly Interval[];
}

const STEP_MS = 12_000;

export const trackPoint = (track: Track, ms: number, radius: number): Point =>
  directionPoint(directionAt(track, ms), radius);

/** The path of a satellite between two instants, both ends exact. */
export function trackPath(track: Track, { fromMs, toMs }: Interval, radius: number): string {
  const points: Point[] = [];
  for (let ms = fromMs; ms < toMs; ms += STEP_MS) points.push(trackPoint(track, ms, radius));
  points.push(trackPoint(track, toMs, radius));
  return pathThrough(points);
}

/** A filled head at the end of the pass that points where the satellite goes. */
export function arrowHead(track: Track, atMs: number, radius: number, size: number): string {
  const [x, y] = trackPoint(track, atMs, radius);
  const [bx, by] = trackPoint(track, atMs - 8000, radius);
  const length = Math.hypot(x - bx, y - by) || 1;
  const [dx, dy] = [(x - bx) / length, (y - by) / length];
  const back: Point = [x - dx * size, y - dy * size];
  const half = size * 0.5;
  return pathThrough(
    [
      [x, y],
      [back[0] - dy * half, back[1] + dx * half],
      [back[0] + dy * half, back[1] - dx * half],
    ],
    true,
  );
}

/** Ticks across the track at whole minutes, each fifth longer. */
export function minuteTicks(track: Track, { fromMs, toMs }: Interval, radius: number): string {
  let d = '';
  for (let ms = Math.ceil(fromMs / MINUTE_MS) * MINUTE_MS; ms <= toMs; ms += MINUTE_MS) {
    const [x, y] = trackPoint(track, ms, radius);
    const [ax, ay] = trackPoint(track, ms + 2000, radius);
    const length = Math.hypot(ax - x, ay - y) || 1;
    const half = (ms / MINUTE_MS) % 5 === 0 ? 4.5 : 2.5;
    const [dx, dy] = [(half * (ax - x)) / length, (half * (ay - y)) / length];
    d += pathThrough([
      [x - dy, y + dx],
      [x + dy, y - dx],
    ]);
  }
  return d;
}
