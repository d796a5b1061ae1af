import type { MaskKnot } from '../../../shared/schedule/model.ts';

/** A horizon mask as lines of pairs, and back from anything that looks like a pasted table. */
export const maskText = (mask: readonly MaskKnot[]): string =>
  mask.map((knot) => `${knot.azimuthDeg} ${knot.elevationDeg}`).join('\n');

/** The knots, or a sentence that names the line that cannot be read. */
export const readMask = (text: string): MaskKnot[] | string => {
  const knots: MaskKnot[] = [];
  for (const [index, line] of text.split(/\r?\n/).entries()) {
    if (line.trim() === '') continue;
    const cells = line
      .trim()
      .split(/[\s;,\t]+/)
      .map(Number);
    const [azimuthDeg, elevationDeg] = cells;
    if (
      cells.length !== 2 ||
      azimuthDeg === undefined ||
      elevationDeg === undefined ||
      cells.some((cell) => !Number.isFinite(cell))
    )
      return `Line ${index + 1} is not a pair of azimuth and elevation`;
    const before = knots.at(-1);
    if (before && azimuthDeg <= before.azimuthDeg)
      return `Line ${index + 1}: the azimuth does not grow`;
    knots.push({ azimuthDeg, elevationDeg });
  }
  return knots.length > 0 ? knots : 'At least one pair is needed';
};
