import { useMemo } from 'react';
import { beamOutline, directionFromAngles } from '../../../charts/beam-outline.ts';
import { pathThrough, polarPoint } from '../../../charts/polar.ts';
import { makeSkyGround, type GroundFace } from '../../../charts/sky-ground.ts';
import { SkySheet } from '../../../charts/sky-sheet.tsx';
import { seriesColor } from '../../../lib/series.ts';
import {
  DRAWN_BEAMS,
  DRAWN_CONTACTS,
  DRAWN_MASK,
  DRAWN_RADIUS,
  DRAWN_TRACKS,
} from './sign-in-drawing-paths.ts';

const FACE: GroundFace = {
  id: 'drawn',
  label: 'A',
  boresightAzimuthDeg: 0,
  boresightElevationDeg: 50,
  rollDeg: 0,
  scanLossExponent: 1.2,
  scanLossTable: null,
  normalLimitDb: 3.6,
  hardEndDb: 3.6,
};
/** Half-power half width of the drawn beams in direction cosine. */
const HALF_WIDTH = 0.0432;

/** One whole day of contacts as ink on the sky sheet: a fixed picture that ships with the client. */
export function SignInDrawing() {
  const ground = useMemo(
    () =>
      makeSkyGround({
        station: {
          horizonMask: DRAWN_MASK.map(([azimuthDeg, elevationDeg]) => ({
            azimuthDeg,
            elevationDeg,
          })),
          keepOutSectors: [
            {
              label: 'keep-out',
              azimuthFromDeg: 52,
              azimuthToDeg: 74,
              elevationFromDeg: 0,
              elevationToDeg: 28,
            },
          ],
        },
        faces: [FACE],
        limitDb: 3.6,
      }),
    [],
  );
  return (
    <figure className="flex h-full min-h-0 flex-col items-center justify-center">
      <div className="[&_svg]:h-auto [&_svg]:max-h-[calc(100dvh-4.5rem)] [&_svg]:w-full">
        <SkySheet
          ground={ground}
          radius={DRAWN_RADIUS}
          label={`The sky over one array face: ${DRAWN_CONTACTS} contacts of a day, drawn as tracks within the scan-loss limit of 3.6 dB, and six beams at one instant`}
        >
          {DRAWN_TRACKS.map(({ series, d }) => (
            <path key={series} d={d} fill="none" stroke={seriesColor(series)} opacity="0.75" />
          ))}
          {DRAWN_BEAMS.map((beam) => (
            <DrawnBeam key={beam.join()} beam={beam} />
          ))}
        </SkySheet>
      </div>
      <figcaption className="self-start px-6 pb-4 text-table text-ink-muted">
        One array face, one day:
        <br />
        <strong className="font-semibold text-ink">
          {DRAWN_CONTACTS} contacts, and six beams at one instant
        </strong>
      </figcaption>
    </figure>
  );
}

function DrawnBeam({ beam }: { beam: readonly [number, number, number] }) {
  const [azimuthDeg, elevationDeg, series] = beam;
  const color = seriesColor(series);
  const outline = beamOutline(FACE, directionFromAngles(azimuthDeg, elevationDeg), {
    widths: { u: HALF_WIDTH, v: HALF_WIDTH },
    radius: DRAWN_RADIUS,
  });
  const [cx, cy] = polarPoint(azimuthDeg, elevationDeg, DRAWN_RADIUS);
  return (
    <g>
      <path d={pathThrough(outline, true)} fill="var(--sheet)" />
      <path
        d={pathThrough(outline, true)}
        fill={color}
        fillOpacity="0.2"
        stroke={color}
        strokeWidth="1.6"
      />
      <circle cx={cx} cy={cy} r="2.4" fill={color} />
    </g>
  );
}
