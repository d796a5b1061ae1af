import { useId, type ReactNode } from 'react';
import type { SkyGround } from './sky-ground.ts';
import { HatchPattern } from './hatch.tsx';
import {
  Centres,
  ContourLabels,
  Contours,
  DiscAndShade,
  KeepOut,
  KeepOutWords,
  Rim,
  Rings,
  Spokes,
  TrackLayer,
} from './sky-layers.tsx';
import type { SkyTrack } from './track-path.ts';

interface Props {
  ground: SkyGround;
  /** Large from 180 on, medium below. */
  radius: number;
  /** Room around the rim for names and figures. */
  margin?: { x: number; y: number };
  tracks?: readonly SkyTrack[];
  instantMs?: number | null;
  /** This track stays at full weight, the others step back. */
  followed?: string | null;
  label: string;
  /** It holds things to act on: then it is a group, not one picture. */
  interactive?: boolean;
  /** Beams, names, hairlines: in the sheet's own coordinates, above the tracks. */
  children?: ReactNode;
}

/** The sky over a station as a printed sheet, see COMPS section 5 of the design. */
export function SkySheet({
  ground,
  radius,
  margin,
  tracks = [],
  instantMs = null,
  followed = null,
  label,
  interactive = false,
  children,
}: Props) {
  const id = useId();
  const large = radius >= 180;
  const layers = ground.at(radius);
  const { x, y } = margin ?? (large ? { x: 44, y: 40 } : { x: 30, y: 30 });
  const [width, height] = [2 * (radius + x), 2 * (radius + y)];
  return (
    <svg
      width={width}
      height={height}
      viewBox={`${-width / 2} ${-height / 2} ${width} ${height}`}
      role={interactive ? 'group' : 'img'}
      aria-label={label}
      className="max-w-full select-none"
    >
      <defs>
        <HatchPattern id={`${id}-hatch`} />
        <clipPath id={`${id}-disc`}>
          <circle r={radius} />
        </clipPath>
      </defs>
      <g clipPath={`url(#${id}-disc)`}>
        <DiscAndShade ground={layers} />
        {large && <Spokes radius={radius} />}
        <Rings radius={radius} steps={large ? [15, 30, 45, 60, 75] : [30, 60]} />
        <KeepOut ground={layers} hatchId={`${id}-hatch`} />
        <Contours ground={layers} />
        <Centres ground={layers} size={large ? 1 : 0.7} />
        <path d={layers.land} fill="var(--land)" fillRule="evenodd" />
        <path d={layers.maskEdge} fill="none" stroke="var(--ink-muted)" strokeWidth="0.9" />
      </g>
      <Rim radius={radius} fine={large} />
      {large && <KeepOutWords ground={layers} />}
      {large && <ElevationFigures radius={radius} />}
      {tracks.map((sky) => (
        <TrackLayer
          key={sky.id}
          sky={sky}
          radius={radius}
          instantMs={instantMs}
          faded={followed !== null && followed !== sky.id}
        />
      ))}
      {children}
      {large && <ContourLabels ground={layers} />}
    </svg>
  );
}

function ElevationFigures({ radius }: { radius: number }) {
  return (
    <g fontSize="12" fill="var(--ink-muted)" className="halo" style={{ '--halo': 'var(--shade)' }}>
      {[30, 60].map((elevation) => {
        const r = (radius * (90 - elevation)) / 90;
        return (
          <text key={elevation} x={r * 0.5} y={r * 0.866 + 4} textAnchor="middle">
            {elevation}°
          </text>
        );
      })}
    </g>
  );
}
