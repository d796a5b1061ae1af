import { beamOutline } from '../../../../charts/beam-outline.ts';
import { directionPoint, pathThrough } from '../../../../charts/polar.ts';
import { trackPoint } from '../../../../charts/track-path.ts';
import { decimals } from '../../../../lib/format-number.ts';
import type { BeamPair } from '../../model/close-pairs.ts';
import type { SkyBeam, SkyIdle } from '../../hooks/use-sky-instant.ts';

interface BeamProps {
  beam: SkyBeam;
  radius: number;
  selected: boolean;
  faded: boolean;
  onSelect: () => void;
  onFollow: (passId: string | null) => void;
}

/** A beam as its true footprint on the sky: the half-power ellipse, broadened by scan. */
export function BeamMark({ beam, radius, selected, faded, onSelect, onFollow }: BeamProps) {
  const { face, direction, widths, color, contact, transmits } = beam;
  const outline = pathThrough(beamOutline(face, direction, { widths, radius }), true);
  const [cx, cy] = directionPoint(direction, radius);
  const inner = pathThrough(
    beamOutline(face, direction, { widths: { u: widths.u * 0.62, v: widths.v * 0.62 }, radius }),
    true,
  );
  return (
    <g
      onClick={onSelect}
      onPointerEnter={() => onFollow(contact.passId)}
      onPointerLeave={() => onFollow(null)}
      opacity={faded ? 0.45 : 1}
      style={{ cursor: 'pointer' }}
    >
      {selected && (
        <path d={outline} fill="none" stroke="var(--accent)" strokeWidth="6" opacity="0.55" />
      )}
      <path d={outline} fill={color} fillOpacity="0.2" stroke={color} strokeWidth="1.6" />
      {transmits && <path d={inner} fill="none" stroke={color} strokeDasharray="2.5 2" />}
      <circle cx={cx} cy={cy} r="2.4" fill={color} />
    </g>
  );
}

interface IdleProps {
  idle: readonly SkyIdle[];
  instantMs: number;
  radius: number;
}

const LINE = 14;

/** Satellites without a beam: open circles; the names of a string of them stand one below the other. */
export function IdleMarks({ idle, instantMs, radius }: IdleProps) {
  const marks = idle
    .map(({ pass, track }) => {
      const [x, y] = trackPoint(track, instantMs, radius);
      return { pass, x, y, nameY: y };
    })
    .sort((a, b) => a.y - b.y);
  for (const [index, mark] of marks.entries())
    for (const above of marks.slice(0, index))
      if (Math.abs(above.x - mark.x) < 70 && mark.nameY < above.nameY + LINE)
        mark.nameY = above.nameY + LINE;
  return (
    <g>
      {marks.map(({ pass, x, y, nameY }) => (
        <g key={pass.id}>
          {Math.abs(nameY - y) > LINE && (
            <path d={`M${x} ${y}L${x + 12} ${nameY}`} stroke="var(--ink-faint)" strokeWidth="0.8" />
          )}
          <circle
            cx={x}
            cy={y}
            r="4"
            fill="var(--sheet)"
            stroke="var(--ink-muted)"
            strokeWidth="1.2"
          />
          <text
            x={x + (Math.abs(nameY - y) > LINE ? 15 : 8)}
            y={nameY + 4}
            fontSize="12"
            fill="var(--ink-muted)"
            className="halo"
          >
            {pass.satelliteName}
          </text>
        </g>
      ))}
    </g>
  );
}

/** A hairline between two beams that come close, with their isolation on it. */
export function ClosePair({ pair, radius }: { pair: BeamPair; radius: number }) {
  const [ax, ay] = directionPoint(pair.a.direction, radius);
  const [bx, by] = directionPoint(pair.b.direction, radius);
  const [mx, my] = [(ax + bx) / 2, (ay + by) / 2];
  // The words stand towards the middle of the sheet, where there is room.
  const length = Math.hypot(mx, my) || 1;
  const [wx, wy] = [mx - (mx / length) * 56, my - (my / length) * 56];
  return (
    <g>
      <path d={`M${ax} ${ay}L${bx} ${by}`} stroke="var(--ink)" />
      <path d={`M${mx} ${my}L${wx} ${wy}`} stroke="var(--ink-faint)" strokeWidth="0.8" />
      <text
        x={wx}
        y={wy + 12}
        textAnchor="middle"
        fontSize="13"
        fontWeight="600"
        fill="var(--ink)"
        className="halo figures"
      >
        {decimals(pair.isolationDb, 1)} dB
        <tspan x={wx} dy="15" fontSize="12" fontWeight="400" fill="var(--ink-muted)">
          needs {decimals(pair.neededDb, 1)}
        </tspan>
      </text>
    </g>
  );
}
