import { toDegrees, wrapDegrees } from '../../units.ts';
import type { PredictedPass } from '../pass.ts';
import { elevationOf } from './clearance.ts';
import { exactCrossing } from './crossing.ts';
import type { Search } from './exact.ts';
import { exactExtreme, higher, type Extreme } from './extremes.ts';
import { maskSides } from './mask-sides.ts';
import type { Node } from './node.ts';
import { firstNode, lastNode, type Run } from './run.ts';
import { uniformSides, type Side } from './sides.ts';

interface Visibility {
  aos: Node;
  los: Node;
  startsBefore: boolean;
  endsAfter: boolean;
}

const crossingBetween = (search: Search, run: Run, below: Side, above: Side): Node =>
  exactCrossing(search, run, {
    belowMs: below.ms,
    aboveMs: above.ms,
    correctionKm: above.correctionKm,
  });

/** Times above the mask, from sides in the order of time. */
function visibilities(search: Search, run: Run, sides: readonly Side[]): Visibility[] {
  const found: Visibility[] = [];
  let aos: Node | null = sides[0]?.isAbove ? firstNode(run) : null;
  let startsBefore = aos !== null;
  for (const [index, side] of sides.entries()) {
    const before = sides[index - 1];
    if (!before || before.isAbove === side.isAbove) continue;
    if (side.isAbove) {
      aos = crossingBetween(search, run, before, side);
      startsBefore = false;
    } else if (aos) {
      const los = crossingBetween(search, run, side, before);
      found.push({ aos, los, startsBefore, endsAfter: false });
      aos = null;
    }
  }
  if (aos) found.push({ aos, los: lastNode(run), startsBefore, endsAfter: true });
  return found;
}

const azimuthDegOf = ({ eastKm, northKm }: Node): number =>
  wrapDegrees(toDegrees(Math.atan2(eastKm, northKm)));

/** The approximation may put a culmination on the wrong side of AOS or LOS by no more than this. */
const SLACK_MS = 1000;

const isInside = (ms: number, { aos, los }: Visibility, slackMs: number): boolean =>
  ms > aos.atMs - slackMs && ms < los.atMs + slackMs;

function passOf(
  search: Search,
  run: Run,
  visibility: Visibility,
  extremes: readonly Extreme[],
): PredictedPass {
  const { aos, los, startsBefore, endsAfter } = visibility;
  const tca = extremes
    .filter(({ kind, ms }) => kind === 'highest' && isInside(ms, visibility, SLACK_MS))
    .map((extreme) => exactExtreme(search, run, extreme))
    .filter(({ atMs }) => isInside(atMs, visibility, 0))
    .reduce(higher, higher(aos, los));
  return {
    aosMs: aos.atMs,
    tcaMs: tca.atMs,
    losMs: los.atMs,
    maxElevationDeg: toDegrees(elevationOf(tca)),
    aosAzimuthDeg: azimuthDegOf(aos),
    tcaAzimuthDeg: azimuthDegOf(tca),
    losAzimuthDeg: azimuthDegOf(los),
    tcaRangeKm: Math.hypot(tca.eastKm, tca.northKm, tca.upKm),
    startsBefore,
    endsAfter,
  };
}

/** The passes of a run, with their elevation extremes given. */
export function passesOfRun(
  search: Search,
  run: Run,
  extremes: readonly Extreme[],
): PredictedPass[] {
  const sides = search.profile.isUniform
    ? uniformSides(search, run, extremes)
    : maskSides(search, run, extremes);
  return visibilities(search, run, sides)
    .filter(({ aos, los }) => los.atMs > aos.atMs)
    .map((visibility) => passOf(search, run, visibility, extremes));
}
