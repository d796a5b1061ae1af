import { fitsChannel } from '../../../../shared/schedule/radio-fit.ts';
import type { OpenPass } from '../../../../shared/schemas/plan.ts';
import { overlaps, type Interval } from '../../../../shared/time.ts';
import type { PlanDesk } from '../hooks/plan-desk.ts';
import type { PlanColumn } from './columns.ts';

/** A pass left open, in the first channel that could take it by its radio and its own time. */
export interface Ghost extends Interval {
  pass: OpenPass;
  channelId: string;
}

/** What is shorter could hardly be a contact. */
const LEAST_MS = 90_000;

type Desk = Pick<PlanDesk, 'openPasses' | 'passes' | 'satellites' | 'columns' | 'legs'>;

function isFree(column: PlanColumn, wanted: Interval, taken: readonly Interval[]): boolean {
  const held = {
    fromMs: wanted.fromMs - column.channel.setUpSeconds * 1000,
    toMs: wanted.toMs + column.channel.tearDownSeconds * 1000,
  };
  return (
    !taken.some((one) => overlaps(one, held)) && !column.closed.some((one) => overlaps(one, wanted))
  );
}

/** Ghosts of a stretch; each channel takes them in the order of time. */
export function ghostsIn(desk: Desk, stretch: Interval): Ghost[] {
  const columns = [...desk.columns.values()].filter(
    ({ channel }) => channel.direction === 'receive',
  );
  const taken = new Map<string, Interval[]>(columns.map(({ id }) => [id, []]));
  for (const leg of desk.legs) taken.get(leg.channelId)?.push(leg);
  const ghosts: Ghost[] = [];
  const wanted = (desk.openPasses ?? []).filter(({ standing }) => standing !== 'unusable');
  for (const pass of [...wanted].sort((a, b) => a.aosUtc.localeCompare(b.aosUtc))) {
    const radio = desk.satellites.get(pass.satelliteId)?.downlink;
    const windows = desk.passes.get(pass.passId)?.windows ?? [];
    const window = windows.find(({ direction }) => direction === 'receive');
    if (!radio || !window) continue;
    const interval = { fromMs: Date.parse(window.fromUtc), toMs: Date.parse(window.toUtc) };
    if (!overlaps(interval, stretch) || interval.toMs - interval.fromMs < LEAST_MS) continue;
    const column = columns.find(
      (one) =>
        one.face.id === window.faceId &&
        fitsChannel(one.channel, radio) &&
        isFree(one, interval, taken.get(one.id) ?? []),
    );
    if (!column) continue;
    taken.get(column.id)?.push(interval);
    ghosts.push({ ...interval, pass, channelId: column.id });
  }
  return ghosts;
}
