import { scaleLinear } from 'd3-scale';
import { area as areaOf, line as lineOf } from 'd3-shape';
import { useId } from 'react';
import type { Interval } from '../../shared/time.ts';
import { clockMinutes } from '../lib/format-time.ts';
import { MINUTE_MS } from '../../shared/time.ts';

export interface StripPoint {
  ms: number;
  value: number | null;
}

interface Props extends Interval {
  title: string;
  unit: string;
  points: readonly StripPoint[];
  domain: readonly [number, number];
  /** A limit as a dashed line that bears its value at the right. */
  limit?: { value: number; words: string } | null;
  /** At the top right: the value that matters most. */
  best?: string | undefined;
  color: string;
  /** Time outside is shaded. */
  within?: readonly Interval[] | null;
  instantMs?: number | null;
  width: number;
  height?: number;
  /** Times under the last of the charts that share one axis. */
  marks?: readonly { ms: number; word: string }[];
}

const LEFT = 30;
const RIGHT = 68;
const TOP = 17;

/** One quantity over one pass; several stand under each other on one time axis. */
export function StripChart(props: Props) {
  const { title, unit, points, domain, limit, best, color, fromMs, toMs, width } = props;
  const { height = 63, marks = [] } = props;
  const clip = useId();
  const foot = marks.length > 0 ? 18 : 4;
  const x = scaleLinear([fromMs, toMs], [LEFT, width - RIGHT]);
  const y = scaleLinear(domain, [height - 2, TOP + 3]);
  const path = lineOf<StripPoint>()
    .defined(({ value }) => value !== null)
    .x(({ ms }) => x(ms))
    .y(({ value }) => y(value ?? 0));
  const right = width - RIGHT;
  return (
    <svg
      width={width}
      height={height + foot}
      className="figures block"
      role="img"
      aria-label={wordsOf(props)}
    >
      <clipPath id={clip}>
        <rect x={LEFT} y={TOP} width={right - LEFT} height={height - TOP} />
      </clipPath>
      <text x={LEFT} y="12" fontSize="12" fontWeight="600" fill="var(--ink)">
        {title}{' '}
        <tspan fontWeight="400" fill="var(--ink-muted)">
          {unit}
        </tspan>
      </text>
      {best && (
        <text x={right} y="12" fontSize="12" fontWeight="600" textAnchor="end" fill="var(--ink)">
          {best}
        </text>
      )}
      <rect x={LEFT} y={TOP} width={right - LEFT} height={height - TOP} fill="var(--sheet)" />
      <Outside {...props} x={x} height={height} />
      {[domain[0], domain[1]].map((value) => (
        <text
          key={value}
          x={LEFT - 6}
          y={y(value) + (value === domain[0] ? 0 : 8)}
          fontSize="12"
          textAnchor="end"
          fill="var(--ink-muted)"
        >
          {value}
        </text>
      ))}
      <path d={`M${LEFT} ${height}H${right}`} stroke="var(--ink-muted)" />
      {limit && (
        <>
          <path
            d={`M${LEFT} ${y(limit.value)}H${right}`}
            stroke="var(--ink-muted)"
            strokeDasharray="4 3"
          />
          <text x={right + 6} y={y(limit.value) + 4} fontSize="12" fill="var(--ink-muted)">
            {limit.words}
          </text>
        </>
      )}
      <g clipPath={`url(#${clip})`}>
        <path d={path(points) ?? ''} fill="none" stroke={color} strokeWidth="1.6" />
      </g>
      {props.instantMs !== null &&
        props.instantMs !== undefined &&
        props.instantMs >= fromMs &&
        props.instantMs <= toMs && (
          <path
            d={`M${x(props.instantMs)} ${TOP}V${height}`}
            stroke="var(--accent)"
            strokeWidth="1.5"
          />
        )}
      {marks.map(({ ms, word }, i) => (
        <text
          key={word}
          x={x(ms)}
          y={height + 14}
          fontSize="12"
          fill="var(--ink-muted)"
          textAnchor={i === 0 ? 'start' : i === marks.length - 1 ? 'end' : 'middle'}
        >
          {word}
        </text>
      ))}
      <MinuteTicks fromMs={fromMs} toMs={toMs} x={x} y={height} />
    </svg>
  );
}

const wordsOf = ({ title, unit, points, limit, fromMs, toMs }: Props): string => {
  const values = points.flatMap(({ value }) => (value === null ? [] : [value]));
  const [low, high] = [Math.min(...values), Math.max(...values)];
  const range = values.length > 0 ? `${low.toFixed(1)} to ${high.toFixed(1)} ${unit}` : 'no values';
  return `${title} from ${clockMinutes(fromMs)} to ${clockMinutes(toMs)} UTC: ${range}${limit ? `, ${limit.words}` : ''}`;
};

function Outside({
  within,
  fromMs,
  toMs,
  x,
  height,
}: Props & { x: (ms: number) => number; height: number }) {
  if (!within) return null;
  const sorted = [...within].sort((a, b) => a.fromMs - b.fromMs);
  const gaps: Interval[] = [];
  let at = fromMs;
  for (const interval of sorted) {
    if (interval.fromMs > at) gaps.push({ fromMs: at, toMs: interval.fromMs });
    at = Math.max(at, interval.toMs);
  }
  if (at < toMs) gaps.push({ fromMs: at, toMs });
  const shade = areaOf<number>()
    .x((ms) => x(ms))
    .y0(TOP)
    .y1(height);
  return (
    <>
      {gaps.map((gap) => (
        <path key={gap.fromMs} d={shade([gap.fromMs, gap.toMs]) ?? ''} fill="var(--shade)" />
      ))}
    </>
  );
}

function MinuteTicks({ fromMs, toMs, x, y }: Interval & { x: (ms: number) => number; y: number }) {
  let d = '';
  for (let ms = Math.ceil(fromMs / MINUTE_MS) * MINUTE_MS; ms < toMs; ms += MINUTE_MS)
    d += `M${x(ms).toFixed(1)} ${y}v-3`;
  return <path d={d} stroke="var(--ink-muted)" />;
}
