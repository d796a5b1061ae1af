import { scaleLinear } from 'd3-scale';
import { useId, useMemo } from 'react';
import { MINUTE_MS, HOUR_MS, type Interval } from '../../shared/time.ts';
import { clockMinutes } from '../lib/format-time.ts';
import { seriesColor } from '../lib/series.ts';
import { HatchPattern } from './hatch.tsx';
import { LoadBrush } from './load-brush.tsx';
import {
  capacityOf,
  countLoad,
  fullStretches,
  runsOf,
  type Load,
  type LoadLeg,
} from './load-counts.ts';

export interface LoadChannel {
  direction: 'receive' | 'transmit';
  closed: readonly Interval[];
}

interface Props {
  span: Interval;
  legs: readonly LoadLeg[];
  channels: readonly LoadChannel[];
  width: number;
  height?: number;
  brush?: Interval | null;
  onBrush?: (brush: Interval, done: boolean) => void;
  instantMs?: number | null;
  onInstant?: (ms: number, done: boolean) => void;
  nowMs?: number | null;
}

export const LOAD_LEFT = 84;
export const LOAD_RIGHT = 116;

/** Beams in use against beam channels over the day: receive grows upward, transmit downward. */
export function LoadLine(props: Props) {
  const { span, legs, channels, width, height = 104 } = props;
  const hatch = useId();
  const data = useMemo(
    () => ({
      receive: sideOf('receive', legs, channels, span),
      transmit: sideOf('transmit', legs, channels, span),
    }),
    [legs, channels, span],
  );
  const x = scaleLinear([span.fromMs, span.toMs], [LOAD_LEFT, width - LOAD_RIGHT]);
  const frame = frameOf(height, data.receive.count, data.transmit.count);
  const right = width - LOAD_RIGHT;
  return (
    <svg
      width={width}
      height={height}
      className="figures block select-none"
      role="group"
      aria-label={wordsOf(data)}
    >
      <defs>
        <HatchPattern id={hatch} />
      </defs>
      <rect
        x={LOAD_LEFT}
        y={frame.top}
        width={right - LOAD_LEFT}
        height={frame.bottom - frame.top}
        fill="var(--sheet)"
      />
      <HourRules span={span} x={x} frame={frame} />
      <Side
        side={data.receive}
        x={x}
        base={frame.receiveBase}
        unit={-frame.receiveUnit}
        hatch={hatch}
        span={span}
      />
      {data.transmit.count > 0 && (
        <Side
          side={data.transmit}
          x={x}
          base={frame.transmitBase}
          unit={frame.transmitUnit}
          hatch={hatch}
          span={span}
        />
      )}
      <SideWords data={data} frame={frame} right={right} />
      {props.nowMs !== null && props.nowMs !== undefined && (
        <NowLine nowMs={props.nowMs} span={span} x={x} frame={frame} />
      )}
      {(props.onBrush ?? props.onInstant) && (
        <LoadBrush
          span={span}
          left={LOAD_LEFT}
          right={right}
          top={frame.top - 4}
          bottom={frame.bottom + 4}
          brush={props.brush ?? null}
          instantMs={props.instantMs ?? null}
          {...(props.onBrush ? { onBrush: props.onBrush } : {})}
          {...(props.onInstant ? { onInstant: props.onInstant } : {})}
        />
      )}
    </svg>
  );
}

interface LoadSide {
  load: Load;
  capacity: Uint8Array;
  count: number;
  full: { from: number; to: number }[];
}
type Scale = (ms: number) => number;

function sideOf(
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

interface Frame {
  top: number;
  bottom: number;
  receiveBase: number;
  receiveUnit: number;
  transmitBase: number;
  transmitUnit: number;
}

/** The two base lines share the height by their channels, transmit never below a third. */
function frameOf(height: number, receive: number, transmit: number): Frame {
  const [top, bottom] = [8, height - 22];
  const room = bottom - top - 4;
  const share = transmit === 0 ? 0 : Math.max(0.3, Math.min(0.4, transmit / (receive + transmit)));
  const receiveHeight = room * (1 - share);
  return {
    top,
    bottom,
    receiveBase: top + receiveHeight,
    receiveUnit: receive === 0 ? 0 : receiveHeight / receive,
    transmitBase: top + receiveHeight + 4,
    transmitUnit: transmit === 0 ? 0 : (room * share) / transmit,
  };
}

function HourRules({ span, x, frame }: { span: Interval; x: Scale; frame: Frame }) {
  const hours: number[] = [];
  for (let ms = Math.ceil(span.fromMs / HOUR_MS) * HOUR_MS; ms <= span.toMs; ms += HOUR_MS)
    hours.push(ms);
  // Three hours a label where there is room for them.
  const pxPerHour = x(span.fromMs + HOUR_MS) - x(span.fromMs);
  const step = pxPerHour > 17 ? 3 : pxPerHour > 8 ? 6 : 12;
  const isLabelled = (ms: number): boolean => ((ms - span.fromMs) / HOUR_MS) % step === 0;
  return (
    <g>
      {hours.map((ms) => (
        <g key={ms}>
          <path
            d={`M${x(ms)} ${frame.top}V${frame.bottom}`}
            stroke={isLabelled(ms) ? 'var(--line)' : 'var(--line-soft)'}
          />
          {isLabelled(ms) && (
            <text
              x={x(ms)}
              y={frame.bottom + 16}
              fontSize="12"
              textAnchor="middle"
              fill="var(--ink-muted)"
            >
              {ms === span.toMs ? '24:00' : clockMinutes(ms)}
            </text>
          )}
        </g>
      ))}
    </g>
  );
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

function Side({ side, x, base, unit, hatch, span }: SideProps) {
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

function SideWords({
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

function NowLine({
  nowMs,
  span,
  x,
  frame,
}: {
  nowMs: number;
  span: Interval;
  x: Scale;
  frame: Frame;
}) {
  if (nowMs < span.fromMs || nowMs > span.toMs) return null;
  const past = x(nowMs) - LOAD_LEFT;
  return (
    <g>
      <rect
        x={LOAD_LEFT}
        y={frame.top}
        width={Math.max(0, past)}
        height={frame.bottom - frame.top}
        fill="var(--surface)"
        opacity="0.45"
      />
      <path
        d={`M${x(nowMs)} ${frame.top - 3}V${frame.bottom + 3}`}
        stroke="var(--danger-mark)"
        strokeWidth="1.75"
      />
    </g>
  );
}

const wordsOf = ({ receive, transmit }: { receive: LoadSide; transmit: LoadSide }): string => {
  const of = (side: LoadSide, word: string): string =>
    side.load.mostAtMs === null
      ? `no ${word} beam in use`
      : `at most ${side.load.most} of ${side.count} ${word} channels in use, at ${clockMinutes(side.load.mostAtMs)} UTC`;
  return `Load of the day: ${of(receive, 'receive')}; ${of(transmit, 'transmit')}`;
};
