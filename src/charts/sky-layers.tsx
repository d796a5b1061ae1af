import { memo, useMemo } from 'react';
import { arrowHead, minuteTicks, trackPath, type SkyTrack } from './track-path.ts';
import { polarPoint, pathThrough } from './polar.ts';
import type { GroundLayers } from './sky-ground.ts';
import type { Interval } from '../../shared/time.ts';

/** Layers of the sky sheet that large and medium share; their order is fixed by the sheet. */

export function DiscAndShade({ ground }: { ground: GroundLayers }) {
  return (
    <>
      <circle r={ground.radius} fill="var(--shade)" />
      {ground.faces.map((face) =>
        face.contours
          .filter(({ isLimit }) => isLimit)
          .map((contour) => <path key={face.id} d={contour.d} fill="var(--sheet)" />),
      )}
    </>
  );
}

export function Rings({ radius, steps }: { radius: number; steps: readonly number[] }) {
  return (
    <g fill="none" strokeWidth="1">
      {steps.map((elevation) => (
        <circle
          key={elevation}
          r={(radius * (90 - elevation)) / 90}
          stroke={elevation % 30 === 0 ? 'var(--rule)' : 'var(--rule-soft)'}
        />
      ))}
    </g>
  );
}

export function Spokes({ radius }: { radius: number }) {
  const spokes = Array.from({ length: 12 }, (_, i) => i * 30);
  return (
    <path
      stroke="var(--rule-soft)"
      d={spokes
        .map((azimuth) =>
          pathThrough([
            polarPoint(azimuth, azimuth % 90 === 0 ? 90 : 82, radius),
            polarPoint(azimuth, 0, radius),
          ]),
        )
        .join('')}
    />
  );
}

export function KeepOut({ ground, hatchId }: { ground: GroundLayers; hatchId: string }) {
  return (
    <g>
      {ground.keepOut.map((sector, index) => (
        <g key={index}>
          <path d={sector.d} fill={`url(#${hatchId})`} />
          <path d={sector.d} fill="none" stroke="var(--hatch)" strokeDasharray="4 2" />
        </g>
      ))}
    </g>
  );
}

export function KeepOutWords({ ground }: { ground: GroundLayers }) {
  const long = ground.radius >= 220;
  return (
    <g fontSize="12" fill="var(--ink-muted)" textAnchor="middle">
      {ground.keepOut.map(({ middle: [x, y] }, index) => (
        <text
          key={index}
          x={x}
          y={y + (long ? -2 : 4)}
          className="halo"
          style={{ '--halo': 'var(--shade)' }}
        >
          {long ? 'keep-out,' : 'keep-out'}
          {long && (
            <tspan x={x} dy="15">
              transmit
            </tspan>
          )}
        </text>
      ))}
    </g>
  );
}

export function Contours({ ground }: { ground: GroundLayers }) {
  return (
    <g fill="none">
      {ground.faces.flatMap((face) =>
        face.contours.map((contour) => (
          <path
            key={`${face.id} ${contour.lossDb}`}
            d={contour.d}
            stroke={contour.isLimit ? 'var(--ink-muted)' : 'var(--iso)'}
            strokeWidth={contour.isLimit ? 1.5 : 0.9}
          />
        )),
      )}
    </g>
  );
}

/** The values of the contours: on the line, the limit outside it; above the tracks, with a halo. */
export function ContourLabels({ ground }: { ground: GroundLayers }) {
  return (
    <g fontSize="12">
      {ground.faces.flatMap((face) =>
        face.contours.map(({ lossDb, isLimit, foot, beside }) => (
          <text
            key={`${face.id} ${lossDb}`}
            x={isLimit ? beside[0] : foot[0] + (lossDb === 3 ? 40 : 0)}
            y={isLimit ? beside[1] + 13 : foot[1] + 4}
            textAnchor={isLimit ? 'end' : 'middle'}
            fontWeight={isLimit ? 600 : 400}
            fill={isLimit ? 'var(--ink)' : 'var(--ink-muted)'}
            className="halo"
            style={{ '--halo': isLimit ? 'var(--shade)' : 'var(--sheet)' }}
          >
            {isLimit ? `${lossDb} dB, the limit` : `${lossDb} dB`}
          </text>
        )),
      )}
    </g>
  );
}

/** Zenith as a cross, boresight as a ring with a cross. */
export function Centres({ ground, size }: { ground: GroundLayers; size: 1 | 0.7 }) {
  const cross = (half: number): string => `M${-half} 0H${half}M0 ${-half}V${half}`;
  return (
    <g stroke="var(--ink-muted)" fill="none">
      <path d={cross(4 * size)} />
      {ground.faces.map((face) => (
        <g key={face.id} transform={`translate(${face.boresight[0]} ${face.boresight[1]})`}>
          <circle r={4.5 * size} strokeWidth="1.2" />
          <path d={cross(8 * size)} />
        </g>
      ))}
    </g>
  );
}

const TEN = Array.from({ length: 36 }, (_, i) => i * 10);
const FIVE = Array.from({ length: 72 }, (_, i) => i * 5);

/** Rim, ticks outward, figures and letters. */
export function Rim({ radius, fine }: { radius: number; fine: boolean }) {
  const tick = (azimuth: number): string => {
    const length = azimuth % 30 === 0 ? 9 : azimuth % 10 === 0 ? 6 : 3.5;
    return pathThrough([
      polarPoint(azimuth, 0, radius),
      polarPoint(azimuth, (-90 * length) / radius, radius),
    ]);
  };
  const label = (azimuth: number, distance: number) => {
    const [x, y] = polarPoint(azimuth, (-90 * distance) / radius, radius);
    return { x, y: y + 4.5, textAnchor: 'middle' as const };
  };
  return (
    <g>
      <circle r={radius} fill="none" stroke="var(--ink)" strokeWidth="1.25" />
      <path d={(fine ? FIVE : TEN).map(tick).join('')} stroke="var(--ink-muted)" />
      {fine &&
        TEN.filter((azimuth) => azimuth % 30 === 0 && azimuth % 90 !== 0).map((azimuth) => (
          <text key={azimuth} {...label(azimuth, 24)} fontSize="12" fill="var(--ink-muted)">
            {String(azimuth).padStart(3, '0')}
          </text>
        ))}
      {['N', 'E', 'S', 'W'].map((letter, i) => (
        <text
          key={letter}
          {...label(i * 90, fine ? 22 : 19)}
          fontSize="14"
          fontWeight="600"
          fill="var(--ink)"
        >
          {letter}
        </text>
      ))}
    </g>
  );
}

interface TrackProps {
  sky: SkyTrack;
  radius: number;
  /** At an instant tracks are thin and carry ticks only near it. */
  instantMs?: number | null;
  faded?: boolean;
}

const near = (interval: Interval, instantMs: number, byMs: number): Interval | null => {
  const fromMs = Math.max(interval.fromMs, instantMs - byMs);
  const toMs = Math.min(interval.toMs, instantMs + byMs);
  return fromMs < toMs ? { fromMs, toMs } : null;
};

/** A pass dotted, its contacts solid, a head where it sets. */
export const TrackLayer = memo(function TrackLayer({
  sky,
  radius,
  instantMs = null,
  faded = false,
}: TrackProps) {
  const color = sky.color ?? 'var(--ink-faint)';
  // While the sky plays only the stretch near the instant is drawn anew.
  const fixed = useMemo(
    () => ({
      pass: trackPath(sky.track, sky, radius),
      head: arrowHead(sky.track, sky.toMs, radius, 7),
      contacts: sky.contacts.map((contact) => trackPath(sky.track, contact, radius)),
    }),
    [sky, radius],
  );
  return (
    <g fill="none" stroke={color} strokeLinecap="round" opacity={faded ? 0.3 : 1}>
      <path d={fixed.pass} strokeWidth="1.1" strokeDasharray="0.1 4" />
      <path d={fixed.head} fill={color} stroke="none" />
      {sky.contacts.map((contact, index) => {
        const thick = instantMs === null ? contact : near(contact, instantMs, 90_000);
        const ticks = instantMs === null ? contact : near(contact, instantMs, 260_000);
        return (
          <g key={contact.fromMs} strokeDasharray={sky.dashed ? '5 3' : undefined}>
            <path d={fixed.contacts[index]} strokeWidth={instantMs === null ? 1.8 : 1.1} />
            {instantMs !== null && thick && (
              <path d={trackPath(sky.track, thick, radius)} strokeWidth="2.4" />
            )}
            {ticks && radius >= 180 && <path d={minuteTicks(sky.track, ticks, radius)} />}
          </g>
        );
      })}
    </g>
  );
});
