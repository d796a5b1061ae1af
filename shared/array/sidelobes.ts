import { amplitudeToDb, lineArrayFactor, type LinePattern } from './array-factor.ts';

const SAMPLES_A_LOBE = 64;

const levelDb = ({ weights, pitch }: LinePattern, u: number): number =>
  amplitudeToDb(lineArrayFactor(weights, pitch, u));

/** Largest level next to a sample that is higher than its neighbours (golden section over one lobe). */
function refinedPeak(line: LinePattern, around: number, step: number): number {
  let [from, to] = [around - step, around + step];
  for (let turn = 0; turn < 60; turn++) {
    const [a, b] = [from + (to - from) / 3, to - (to - from) / 3];
    if (levelDb(line, a) > levelDb(line, b)) to = b;
    else from = a;
  }
  return levelDb(line, (from + to) / 2);
}

/**
 * First and highest sidelobe of a line of elements, dB below the beam as a negative number, within half a period of the
 * pattern (grating lobes are judged elsewhere). To 0.001 dB. Needs three elements or more; -200 where there is none.
 */
export function sidelobesDb(line: LinePattern): { firstDb: number; highestDb: number } {
  const step = 1 / (line.weights.length * line.pitch) / SAMPLES_A_LOBE;
  const peaks: number[] = [];
  let [before, at] = [0, levelDb(line, step)];
  for (let index = 2; index * step <= 0.5 / line.pitch + step; index++) {
    const after = levelDb(line, index * step);
    if (at > before && at >= after) peaks.push(refinedPeak(line, (index - 1) * step, step));
    [before, at] = [at, after];
  }
  return { firstDb: peaks[0] ?? -200, highestDb: Math.max(-200, ...peaks) };
}

/**
 * Distance in direction cosine, in a principal plane, beyond which a beam stays below `isolationDb` under its peak: the
 * last crossing of the level within half a period. To 1e-12; null when some sidelobe near the end is still above it.
 */
export function leastSeparationU(line: LinePattern, isolationDb: number): number | null {
  const step = 1 / (line.weights.length * line.pitch) / SAMPLES_A_LOBE;
  const last = Math.floor(0.5 / line.pitch / step);
  for (let index = last; index >= 0; index--) {
    if (levelDb(line, index * step) < -isolationDb) continue;
    if (index === last) return null;
    let [above, below] = [index * step, (index + 1) * step];
    while (below - above > 1e-13) {
      const middle = (above + below) / 2;
      if (levelDb(line, middle) >= -isolationDb) above = middle;
      else below = middle;
    }
    return above;
  }
  return 0;
}
