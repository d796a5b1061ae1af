import { directionOnFace } from '../../../shared/array/face-geometry.ts';
import { scanLossDb } from '../../../shared/array/scan-loss.ts';
import { directionAt } from '../../../shared/orbit/track.ts';
import type { ContactModel } from '../../../shared/schedule/model.ts';
import { overlaps, SECOND_MS } from '../../../shared/time.ts';
import type { World } from './world.ts';

export interface ContactFigures {
  maxElevationDeg: number;
  minScanLossDb: number | null;
  maxScanLossDb: number | null;
  /** Least margin of the usable windows that the legs lie in; null where a leg lies in none. */
  minMarginDb: number | null;
}

/** Fine enough for a figure with one decimal: scan loss turns by less than 0.05 dB in five seconds. */
const STEP_MS = 5 * SECOND_MS;

/** What a contact's list row shows of its geometry, over the receive leg. */
export const contactFigures = (world: World, contact: ContactModel): ContactFigures => {
  const pass = world.context.passes.get(contact.passId);
  const face = world.context.faces.get(contact.faceId);
  if (!pass || !face)
    return { maxElevationDeg: 0, minScanLossDb: null, maxScanLossDb: null, minMarginDb: null };
  let least = Infinity;
  let most = -Infinity;
  const { fromMs, toMs } = contact.receive;
  for (let atMs = fromMs; ; atMs = Math.min(atMs + STEP_MS, toMs)) {
    const onFace = directionOnFace(face, directionAt(pass.track, atMs));
    const loss = scanLossDb(face, onFace.scanAngleRad) ?? Infinity;
    least = Math.min(least, loss);
    most = Math.max(most, loss);
    if (atMs >= toMs) break;
  }
  return {
    maxElevationDeg: pass.maxElevationDeg,
    minScanLossDb: Number.isFinite(least) ? least : null,
    maxScanLossDb: Number.isFinite(most) ? most : null,
    minMarginDb: leastMargin(world, contact),
  };
};

const leastMargin = (world: World, contact: ContactModel): number | null => {
  const margins = (['receive', 'transmit'] as const).flatMap((direction) => {
    const leg = contact[direction];
    if (!leg) return [];
    const window = world.context
      .windowsOf(contact.passId, contact.faceId, direction)
      .find((one) => overlaps(one, leg));
    return [window?.minMarginDb ?? null];
  });
  return margins.reduce<number | null>(
    (least, one) => (least === null || one === null ? null : Math.min(least, one)),
    Infinity,
  );
};
