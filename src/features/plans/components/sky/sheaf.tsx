import { useEffect, useMemo, useRef } from 'react';
import { directionFromFace, faceAxes } from '../../../../../shared/array/face-geometry.ts';
import { lineArrayFactor } from '../../../../../shared/array/array-factor.ts';
import { pitchInWavelengths } from '../../../../../shared/array/beamwidth.ts';
import { scanAngleForLoss } from '../../../../../shared/array/scan-loss.ts';
import { taperWeights } from '../../../../../shared/array/taper.ts';
import type { Face } from '../../../../../shared/schemas/face.ts';
import { RAMP_DB, rampColor, type Rgb } from '../../../../charts/heat-ramp.ts';
import { useShownTheme } from '../../../../lib/theme.ts';
import type { SkyBeam } from '../../hooks/use-sky-instant.ts';
import type { BeamPair } from '../../model/close-pairs.ts';

interface Props {
  face: Face;
  beams: readonly SkyBeam[];
  frequencyMhz: number;
  limitDb: number;
  pair: BeamPair | null;
  size: number;
}

const PIXELS = 240;
const FLOOR_DB = -45;

/** Row and column factors of a face's receive pattern, one number a pixel, around one beam's centre. */
function factors(
  face: Face,
  axis: 'x' | 'y',
  frequencyMhz: number,
): (centre: number) => Float64Array {
  const [elements, pitchMm] =
    axis === 'x' ? [face.elementsX, face.pitchXMm] : [face.elementsY, face.pitchYMm];
  const weights = taperWeights(face.receiveTaper, elements);
  const pitch = pitchInWavelengths(pitchMm, frequencyMhz);
  // The factor depends on the distance only: a table of it makes each frame cheap.
  const table = Float64Array.from(
    { length: 4 * PIXELS + 1 },
    (_, i) => lineArrayFactor(weights, pitch, i / (2 * PIXELS)) ** 2,
  );
  return (centre) =>
    Float64Array.from({ length: PIXELS }, (_, i) => {
      const u = ((i + 0.5) / PIXELS) * 2 - 1;
      return table[Math.min(table.length - 1, Math.round(Math.abs(u - centre) * 2 * PIXELS))] ?? 0;
    });
}

/** 1 above the horizon, 0 below it, -1 outside the visible region; row by row from the top (v = 1). */
function skyMask(face: Face): Int8Array {
  const axes = faceAxes(face);
  return Int8Array.from({ length: PIXELS * PIXELS }, (_, at) => {
    const u = (((at % PIXELS) + 0.5) / PIXELS) * 2 - 1;
    const v = 1 - ((Math.floor(at / PIXELS) + 0.5) / PIXELS) * 2;
    const direction = directionFromFace(axes, u, v);
    return direction === null ? -1 : direction[2] >= 0 ? 1 : 0;
  });
}

const LAND: Record<'light' | 'dark', Rgb> = { light: [216, 212, 198], dark: [42, 48, 58] };

/** The array's actual pattern at the instant: the superposed beams as a heat map on the u-v plane. */
export function Sheaf({ face, beams, frequencyMhz, limitDb, pair, size }: Props) {
  const canvas = useRef<HTMLCanvasElement>(null);
  const theme = useShownTheme();
  const { x, y, mask } = useMemo(
    () => ({
      x: factors(face, 'x', frequencyMhz),
      y: factors(face, 'y', frequencyMhz),
      mask: skyMask(face),
    }),
    [face, frequencyMhz],
  );
  useEffect(() => {
    const context = canvas.current?.getContext('2d');
    if (!context) return;
    const image = context.createImageData(PIXELS, PIXELS);
    const parts = beams.map(({ u, v }) => ({ row: x(u), column: y(v) }));
    const floor = 10 ** (FLOOR_DB / 10);
    for (let row = 0; row < PIXELS; row++)
      for (let column = 0; column < PIXELS; column++) {
        const at = row * PIXELS + column;
        const kind = mask[at] ?? -1;
        if (kind < 0) continue;
        let power = floor;
        for (const part of parts)
          power += (part.row[column] ?? 0) * (part.column[PIXELS - 1 - row] ?? 0);
        const color = rampColor(theme, 10 * Math.log10(power));
        const [r, g, b] = kind === 0 ? mixed(color, LAND[theme]) : color;
        image.data.set([r, g, b, 255], at * 4);
      }
    context.putImageData(image, 0, 0);
  }, [beams, x, y, mask, theme]);
  const half = size / 2;
  return (
    <div className="relative" style={{ width: size, height: size }}>
      <canvas
        ref={canvas}
        width={PIXELS}
        height={PIXELS}
        className="absolute inset-0 size-full rounded-full"
        role="img"
        aria-label={`Pattern of ${beams.length} receive beams on the u-v plane of ${face.label}`}
      />
      <svg
        viewBox={`${-half} ${-half} ${size} ${size}`}
        className="absolute inset-0 overflow-visible"
        aria-hidden="true"
      >
        <circle r={half - 0.5} fill="none" stroke="var(--ink)" />
        {[1, 2, limitDb].map((lossDb) => {
          const r = Math.sin(scanAngleForLoss(face, lossDb)) * half;
          const isLimit = lossDb === limitDb;
          return (
            <g key={lossDb}>
              <circle
                r={r}
                fill="none"
                stroke={isLimit ? 'var(--ink-muted)' : 'var(--iso)'}
                strokeWidth={isLimit ? 1.5 : 0.9}
                opacity="0.8"
              />
              <text
                y={-r + 4}
                textAnchor="middle"
                fontSize="12"
                fill="var(--ink-muted)"
                className="halo"
              >
                {isLimit ? `${lossDb} dB` : lossDb}
              </text>
            </g>
          );
        })}
        {pair && <CutLine pair={pair} half={half} />}
        {beams.map((beam) => (
          <g key={beam.contact.id} transform={`translate(${beam.u * half} ${-beam.v * half})`}>
            <ellipse
              rx={beam.widths.u * half}
              ry={beam.widths.v * half}
              fill="none"
              stroke="var(--sheet)"
              strokeWidth="3.4"
            />
            <ellipse
              rx={beam.widths.u * half}
              ry={beam.widths.v * half}
              fill="none"
              stroke={beam.color}
              strokeWidth="1.9"
            />
            <text
              y={nameY(beam, beams, half)}
              textAnchor="middle"
              fontSize="12"
              fontWeight="600"
              fill="var(--ink)"
              className="halo"
            >
              {beam.contact.satelliteName}
            </text>
          </g>
        ))}
      </svg>
    </div>
  );
}

/** A name stands above its beam where another beam lies close below, else under it. */
function nameY(beam: SkyBeam, beams: readonly SkyBeam[], half: number): number {
  const crowded = beams.some(
    (other) =>
      other !== beam && Math.hypot(other.u - beam.u, other.v - beam.v) < 0.3 && other.v < beam.v,
  );
  return crowded ? -beam.widths.v * half - 6 : beam.widths.v * half + 15;
}

const mixed = (a: Rgb, b: Rgb): Rgb => [
  Math.round(a[0] * 0.45 + b[0] * 0.55),
  Math.round(a[1] * 0.45 + b[1] * 0.55),
  Math.round(a[2] * 0.45 + b[2] * 0.55),
];

function CutLine({ pair, half }: { pair: BeamPair; half: number }) {
  const { a, b } = pair;
  const length = Math.hypot(b.u - a.u, b.v - a.v) || 1;
  const [du, dv] = [(b.u - a.u) / length, (b.v - a.v) / length];
  const reach = length / 2 + 0.14;
  const [mu, mv] = [(a.u + b.u) / 2, (a.v + b.v) / 2];
  const end = (side: number): string =>
    `${(mu + side * du * reach) * half} ${-(mv + side * dv * reach) * half}`;
  return <path d={`M${end(-1)}L${end(1)}`} stroke="var(--accent)" strokeWidth="1.6" />;
}

/** The scale beside the heat map. */
export function SheafScale() {
  const theme = useShownTheme();
  const height = 150;
  const yOf = (db: number): number => (-db / 45) * height;
  return (
    <svg width="110" height={height + 16} aria-hidden="true" className="figures">
      <g transform="translate(0 8)">
        {Array.from({ length: 45 }, (_, i) => (
          <rect
            key={i}
            y={(i * height) / 45}
            width="13"
            height={height / 45 + 0.6}
            fill={`rgb(${rampColor(theme, -i).join(' ')})`}
          />
        ))}
        <rect width="13" height={height} fill="none" stroke="var(--line-strong)" />
        {RAMP_DB.filter((db) => ![-40, -13, -6].includes(db)).map((db) => (
          <text key={db} x="20" y={yOf(db) + 4} fontSize="12" fill="var(--ink-muted)">
            {db === 0 ? '0 dB' : `−${-db}`}
            {db === -3 && ' half power'}
          </text>
        ))}
      </g>
    </svg>
  );
}
