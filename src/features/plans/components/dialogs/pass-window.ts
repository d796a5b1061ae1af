import type { Pass } from '../../../../../shared/schemas/pass.ts';
import type { Interval } from '../../../../../shared/time.ts';

/** The usable window of a face and direction that holds (or is nearest to) a time. */
export function windowOf(
  pass: Pass | undefined,
  faceId: string,
  direction: 'receive' | 'transmit',
  near: Interval,
): Interval | null {
  const windows = (pass?.windows ?? [])
    .filter((window) => window.faceId === faceId && window.direction === direction)
    .map(({ fromUtc, toUtc }) => ({ fromMs: Date.parse(fromUtc), toMs: Date.parse(toUtc) }));
  const distance = ({ fromMs, toMs }: Interval): number =>
    Math.max(0, fromMs - near.toMs, near.fromMs - toMs);
  return windows.sort((a, b) => distance(a) - distance(b))[0] ?? null;
}
