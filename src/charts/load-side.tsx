import { MINUTE_MS, type Interval } from '../../shared/time.ts';
import { clockMinutes } from '../lib/format-time.ts';
import { seriesColor } from '../lib/series.ts';
import {
  capacityOf,
  countLoad,
  fullStretches,
  runsOf,
  type Load,
  type LoadLeg,
} from './load-counts.ts';
import { LOAD_LEFT, type Frame, type Scale } from './load-frame.tsx';

export interface LoadChannel {
  direction: 'receive' | 'transmit';
  closed: readonly Interval[];
}

/** One direction of the day: its beams and what its open channels could hold. */
export interface LoadSide {
  load: Load;
  capacity: Uint8Array;
  count: number;
  full: { from: number; to: number }[];
}

export function sideOf(
  direction: 'receive' | 'transmit',
  legs: readonly LoadLeg[],
  channels: readonly LoadChannel[],
  span: Interval,
): LoadSide {
  const own = channels.filter((channel) => channel.direction === direction);
  const load = countLoad(legs, direction, span);
  const capacity = capacityOf(own, span);
  return { load, capacity, count: own.length, full: fullStretches(load.total, capacity) };
}

interface SideProps {
  side: LoadSide;
  x: Scale;
  base: number;
  /** Height of one channel, px; negative grows upward. */
  unit: number;
  hatch: string;
  span: Interval;
}

export function Side({ side, x, base, unit, hatch, span }: SideProps) {
  const at = (minute: number): number => x(span.fromMs + minute * MINUTE_MS);
  const runs = runsOf(side.capacity);
  const edge = base + side.count * unit;
  const line = runs.map(
    ({ from, to, value }) => `${at(from)} ${base + value * unit}L${at(to)} ${base + value * unit}`,
  );
  const below = new Uint8Array(side.load.total.length);
  return (
    <g>
      {runs
        .filter(({ value }) => value < side.count)
        .map(({ from, to, value }) => {
          const closed = {
            x: at(from),
            width: at(to) - at(from),
            y: Math.min(edge, base + value * unit),
            height: Math.abs((side.count - value) * unit),
          };
          return (
            <g key={from}>
              <rect {...closed} fill="var(--shade)" />
              <rect {...closed} fill={`url(#${hatch})`} opacity="0.7" />
            </g>
          );
        })}
      {side.load.stacks.map(({ series, counts }) => (
        <path
          key={series ?? 'hidden'}
          d={stackPath(counts, below, { at, base, unit })}
          fill={series === null ? 'var(--ink-faint)' : seriesColor(series)}
        />
      ))}
      <path d={`M${line.join('L')}`} fill="none" stroke="var(--ink-muted)" />
      <path
        d={`M${at(0)} ${base}H${at(side.capacity.length)}`}
        stroke="var(--ink)"
        strokeWidth="1.25"
      />
      {side.full.map(({ from, to }) => {
        const middle = (at(from) + at(to)) / 2;
        const tip = unit < 0 ? edge - 1 : edge + 1;
        const d = unit < 0 ? 'l-4 -6h8Z' : 'l-4 6h8Z';
        return <path key={from} d={`M${middle} ${tip}${d}`} fill="var(--warn-mark)" />;
      })}
    </g>
  );
}

/** Rectangles of one mission on top of those before it; `below` grows as it goes. */
function stackPath(
  counts: Uint8Array,
  below: Uint8Array,
  { at, base, unit }: { at: Scale; base: number; unit: number },
): string {
  let d = '';
  let minute = 0;
  while (minute < counts.length) {
    const [count, under] = [counts[minute] ?? 0, below[minute] ?? 0];
    let end = minute + 1;
    while (end < counts.length && counts[end] === count && below[end] === under) end++;
    if (count > 0) {
      const [x0, x1] = [at(minute), at(end)];
      d += `M${x0.toFixed(1)} ${(base + under * unit).toFixed(1)}H${x1.toFixed(1)}v${(count * unit).toFixed(1)}H${x0.toFixed(1)}Z`;
      for (let m = minute; m < end; m++) below[m] = under + count;
    }
    minute = end;
  }
  return d;
}

export function SideWords({
  data,
  frame,
  right,
}: {
  data: { receive: LoadSide; transmit: LoadSide };
  frame: Frame;
  right: number;
}) {
  const { receive, transmit } = data;
  const isFull = receive.full.length + transmit.full.length > 0;
  const muted = { fontSize: 12, fill: 'var(--ink-muted)' };
  return (
    <g>
      <text x={LOAD_LEFT - 8} y={frame.top + 10} textAnchor="end" {...muted}>
        {receive.count}
      </text>
      <text
        x={LOAD_LEFT - 8}
        y={frame.receiveBase - 8}
        textAnchor="end"
        fontSize="12"
        fontWeight="600"
        fill="var(--ink)"
      >
        receive
      </text>
      {transmit.count > 0 && (
        <text
          x={LOAD_LEFT - 8}
          y={frame.transmitBase + 16}
          textAnchor="end"
          fontSize="12"
          fontWeight="600"
          fill="var(--ink)"
        >
          transmit
        </text>
      )}
      <text x={right + 9} y={frame.top + 10} {...muted}>
        of {receive.count} channels
      </text>
      {receive.load.mostAtMs !== null && (
        <text x={right + 9} y={frame.top + 28} fontSize="12" fontWeight="600" fill="var(--ink)">
          {receive.load.most} at {clockMinutes(receive.load.mostAtMs)}
        </text>
      )}
      {transmit.count > 0 && (
        <text x={right + 9} y={frame.transmitBase + 7} {...muted}>
          of {transmit.count} channels
        </text>
      )}
      {isFull && (
        <text
          x={right + 9}
          y={frame.transmitBase + 23}
          fontSize="12"
          fontWeight="600"
          fill="var(--warn-text)"
        >
          ▲ at the limit
        </text>
      )}
    </g>
  );
}
