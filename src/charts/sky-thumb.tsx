import { memo } from 'react';
import { classNames } from '../lib/class-names.ts';
import type { SkyGround } from './sky-ground.ts';
import { arrowHead, trackPath, trackPoint, type SkyTrack } from './track-path.ts';

interface Props {
  ground: SkyGround;
  /** Outer diameter, px: 36 to 118. */
  size: number;
  tracks: readonly SkyTrack[];
  /** Satellites shown as dots at this instant. */
  instantMs?: number | null;
  label?: string;
  className?: string;
}

/** The sky sheet at the size of a row: the limit, the mask, two rings, the track and its arrow stay. */
export const SkyThumb = memo(function SkyThumb({
  ground,
  size,
  tracks,
  instantMs = null,
  label,
  className,
}: Props) {
  const radius = size / 2 - 1;
  const layers = ground.at(radius);
  const half = size / 2;
  return (
    <svg
      width={size}
      height={size}
      viewBox={`${-half} ${-half} ${size} ${size}`}
      className={classNames('shrink-0', className)}
      role={label ? 'img' : undefined}
      aria-label={label}
      aria-hidden={label ? undefined : true}
    >
      <circle r={radius} fill="var(--shade)" />
      {layers.faces.map((face) =>
        face.contours
          .filter(({ isLimit }) => isLimit)
          .map((contour) => (
            <path
              key={face.id}
              d={contour.d}
              fill="var(--sheet)"
              stroke="var(--ink-muted)"
              strokeWidth="0.9"
            />
          )),
      )}
      <g fill="none" stroke="var(--rule)" strokeWidth="0.75">
        <circle r={radius / 3} />
        <circle r={(radius * 2) / 3} />
      </g>
      <path d={layers.land} fill="var(--land)" fillRule="evenodd" />
      <circle r={radius} fill="none" stroke="var(--ink)" />
      {tracks.map((sky) => (
        <ThumbTrack key={sky.id} sky={sky} radius={radius} instantMs={instantMs} />
      ))}
    </svg>
  );
});

function ThumbTrack({
  sky,
  radius,
  instantMs,
}: {
  sky: SkyTrack;
  radius: number;
  instantMs: number | null;
}) {
  const color = sky.color ?? 'var(--ink-faint)';
  const shows = instantMs !== null && sky.fromMs <= instantMs && instantMs <= sky.toMs;
  const dot = shows ? trackPoint(sky.track, instantMs, radius) : null;
  return (
    <g fill="none" stroke={color} strokeLinecap="round">
      <path d={trackPath(sky.track, sky, radius)} strokeDasharray="1.5 2" strokeLinecap="butt" />
      {sky.contacts.map((contact) => (
        <path
          key={contact.fromMs}
          d={trackPath(sky.track, contact, radius)}
          strokeWidth="2"
          strokeDasharray={sky.dashed ? '4 2' : undefined}
        />
      ))}
      <path
        d={arrowHead(sky.track, sky.toMs, radius, radius > 30 ? 5 : 4)}
        fill={color}
        stroke="none"
      />
      {dot && <circle cx={dot[0]} cy={dot[1]} r="2.6" fill={color} stroke="none" />}
    </g>
  );
}
