import { directionPoint } from '../../../../charts/polar.ts';
import { azimuth, decimals } from '../../../../lib/format-number.ts';
import type { SkyBeam } from '../../hooks/use-sky-instant.ts';
import { usePlanDesk } from '../../hooks/plan-desk.ts';

interface Props {
  beams: readonly SkyBeam[];
  radius: number;
  /** Distance of the words from the middle, px. */
  reach: number;
  onSelect: (contactId: string) => void;
  onFollow: (passId: string | null) => void;
}

const STEP = 42;

interface Place {
  beam: SkyBeam;
  x: number;
  y: number;
  labelY: number;
  side: -1 | 1;
}

/** Names to the left and right, 42 px apart, in the order of their beams so that leaders do not cross. */
export function placeNames(beams: readonly SkyBeam[], radius: number): Place[] {
  const all = beams.map((beam): Place => {
    const [x, y] = directionPoint(beam.direction, radius);
    return { beam, x, y, labelY: y, side: x < 0 ? -1 : 1 };
  });
  return ([-1, 1] as const).flatMap((side) => {
    const own = all.filter((place) => place.side === side).sort((a, b) => a.y - b.y);
    const first = -radius + 20;
    let next = first;
    for (const place of own) {
      place.labelY = Math.max(next, Math.min(place.y, radius - 20));
      next = place.labelY + STEP;
    }
    // What ran over the foot moves the list up again.
    const over = next - STEP - (radius - 10);
    if (over > 0) for (const place of own) place.labelY = Math.max(first, place.labelY - over);
    return own;
  });
}

export function SkyNames({ beams, radius, reach, onSelect, onFollow }: Props) {
  const { labelOf } = usePlanDesk();
  return (
    <g className="figures">
      {placeNames(beams, radius).map(({ beam, x, y, labelY, side }) => {
        const { contact, look, lossDb, transmits } = beam;
        const edge = side * reach;
        const anchor = side < 0 ? 'end' : 'start';
        return (
          <g
            key={contact.id}
            role="button"
            tabIndex={0}
            aria-label={`${contact.satelliteName} on ${labelOf(contact.receive.channelId)}, azimuth ${azimuth(look.azimuthDeg)}, elevation ${decimals(look.elevationDeg, 1)} deg, scan loss ${decimals(lossDb, 1)} dB`}
            onKeyDown={(event) => {
              if (event.key !== 'Enter' && event.key !== ' ') return;
              event.preventDefault();
              onSelect(contact.id);
            }}
            onFocus={() => onFollow(contact.passId)}
            onBlur={() => onFollow(null)}
            onClick={() => onSelect(contact.id)}
            onPointerEnter={() => onFollow(contact.passId)}
            onPointerLeave={() => onFollow(null)}
            style={{ cursor: 'pointer' }}
          >
            <path
              d={`M${edge} ${labelY}h${-side * 14}L${x} ${y}`}
              fill="none"
              stroke="var(--ink-faint)"
              strokeWidth="0.8"
            />
            <circle cx={edge + side * 6} cy={labelY - 1} r="3" fill={beam.color} />
            <text
              x={edge + side * 14}
              y={labelY + 3}
              textAnchor={anchor}
              fontSize="12.5"
              fill="var(--ink)"
            >
              <tspan fontWeight="600">{contact.satelliteName}</tspan>
              <tspan fill="var(--ink-muted)">
                {' '}
                {labelOf(contact.receive.channelId)}
                {transmits && contact.transmit && ` ↑${labelOf(contact.transmit.channelId)}`}
              </tspan>
            </text>
            <text
              x={edge + side * 14}
              y={labelY + 18}
              textAnchor={anchor}
              fontSize="12"
              fill="var(--ink-muted)"
            >
              az {azimuth(look.azimuthDeg)} el {decimals(look.elevationDeg, 1)} loss{' '}
              {decimals(lossDb, 1)}
            </text>
          </g>
        );
      })}
    </g>
  );
}
