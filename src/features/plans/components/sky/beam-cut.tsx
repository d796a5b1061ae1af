import { scaleLinear } from 'd3-scale';
import { line as lineOf } from 'd3-shape';
import { useMemo } from 'react';
import { decimals } from '../../../../lib/format-number.ts';
import { amplitudeDb, patternOf, type BeamPair } from '../../model/close-pairs.ts';

interface Props {
  pair: BeamPair;
  frequencyMhz: number;
  width: number;
  height: number;
}

const LEFT = 38;
const [TOP, BOTTOM] = [24, 36];
const FLOOR = -45;
const POINTS = 360;

/** A cut through two beams: dB over the offset along the line through both centres. */
export function BeamCut({ pair, frequencyMhz, width, height }: Props) {
  const { a, b } = pair;
  const between = Math.hypot(b.u - a.u, b.v - a.v);
  const reach = Math.max(0.2, between * 1.6);
  const cuts = useMemo(() => {
    const pattern = patternOf(a.face, frequencyMhz);
    const [du, dv] = between === 0 ? [1, 0] : [(b.u - a.u) / between, (b.v - a.v) / between];
    const of = (centre: number): { s: number; db: number }[] =>
      Array.from({ length: POINTS + 1 }, (_, i) => {
        const s = -reach + (2 * reach * i) / POINTS;
        return {
          s,
          db: amplitudeDb(pattern((s - centre) * du, (s - centre) * dv), a.face.sidelobeFloorDb),
        };
      });
    return [of(-between / 2), of(between / 2)] as const;
  }, [a, b, between, reach, frequencyMhz]);
  const x = scaleLinear([-reach, reach], [LEFT, width - 6]);
  const y = scaleLinear([0, FLOOR], [TOP, height - BOTTOM]);
  const path = lineOf<{ s: number; db: number }>()
    .x(({ s }) => x(s))
    .y(({ db }) => y(db));
  const needed = -pair.neededDb;
  const [xa, xb] = [x(-between / 2), x(between / 2)];
  return (
    <svg
      width={width}
      height={height}
      className="figures"
      role="img"
      aria-label={`Cut through ${a.contact.satelliteName} and ${b.contact.satelliteName}: the pattern of one is ${decimals(pair.downDb, 1)} dB down at the other`}
    >
      <rect
        x={LEFT}
        y={TOP}
        width={width - LEFT - 6}
        height={height - TOP - BOTTOM}
        fill="var(--sheet)"
      />
      {[0, -10, -20, -30, -40].map((db) => (
        <g key={db}>
          <path d={`M${LEFT} ${y(db)}H${width - 6}`} stroke="var(--rule-soft)" />
          <text x={LEFT - 6} y={y(db) + 4} textAnchor="end" fontSize="12" fill="var(--ink-muted)">
            {db === 0 ? '0' : `−${-db}`}
          </text>
        </g>
      ))}
      {x.ticks(5).map((s) => (
        <text
          key={s}
          x={x(s)}
          y={height - BOTTOM + 15}
          textAnchor="middle"
          fontSize="12"
          fill="var(--ink-muted)"
        >
          {decimals(s, 1)}
        </text>
      ))}
      <path d={`M${LEFT} ${height - BOTTOM}H${width - 6}`} stroke="var(--ink-muted)" />
      <path
        d={`M${xa} ${TOP}V${height - BOTTOM}M${xb} ${TOP}V${height - BOTTOM}`}
        stroke="var(--ink-faint)"
      />
      <path
        d={`M${LEFT} ${y(needed)}H${width - 6}`}
        stroke="var(--warn-mark)"
        strokeDasharray="5 3"
      />
      <text
        x={width - 10}
        y={y(needed) - 5}
        textAnchor="end"
        fontSize="12"
        fontWeight="600"
        fill="var(--warn-text)"
        className="halo"
      >
        {decimals(pair.neededDb, 0)} dB needed
      </text>
      <path d={path(cuts[0]) ?? ''} fill="none" stroke={a.color} strokeWidth="1.7" />
      <path
        d={path(cuts[1]) ?? ''}
        fill="none"
        stroke={b.color}
        strokeWidth="1.7"
        strokeDasharray="5 3"
      />
      <path d={`M${xa} ${y(0)}V${y(-pair.downDb)}`} stroke="var(--ink)" strokeWidth="1.5" />
      <circle cx={xa} cy={y(-pair.downDb)} r="3.5" fill="var(--ink)" />
      <text
        x={xa - 8}
        y={y(-pair.downDb) + 16}
        textAnchor="end"
        fontSize="12"
        fontWeight="600"
        fill="var(--ink)"
        className="halo"
      >
        −{decimals(pair.downDb, 1)} dB
      </text>
      <text x={xa} y={TOP - 8} textAnchor="end" fontSize="12" fontWeight="600" fill="var(--ink)">
        {a.contact.satelliteName}
      </text>
      <text x={xb} y={TOP - 8} fontSize="12" fontWeight="600" fill="var(--ink)">
        {b.contact.satelliteName}, dashed
      </text>
      <text x={LEFT} y={height - 4} fontSize="12" fill="var(--ink-muted)">
        offset along the cut, direction cosine; dB below each beam’s peak
      </text>
    </svg>
  );
}
