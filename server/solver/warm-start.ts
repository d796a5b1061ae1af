import type { RunControl } from './control.ts';
import { greedyFill, improve } from './search/large-neighbourhood.ts';
import { PlanState, type SearchProblem } from './search/plan-state.ts';
import { seededRandom } from './seeded-random.ts';

const SEED = 20261202;

/** A valid plan within `seconds`: greedy, then large-neighbourhood search. `given` is tried first, as far as it fits. */
export function findStart(
  problem: SearchProblem,
  given: readonly number[],
  seconds: number,
  control: RunControl,
): number[] {
  const state = new PlanState(problem);
  for (const column of given) if (state.canAdd(column)) state.add(column);
  greedyFill(problem, state);
  control.onIncumbent(state.columns());
  return improve(problem, state, {
    deadline: control.now() + seconds * 1000,
    now: control.now,
    random: seededRandom(SEED),
    shouldStop: control.shouldStop,
    onBetter: control.onIncumbent,
  });
}

/** How long the search may run before the solver takes over, by the number of columns: small models do not need it. */
const START_SECONDS: readonly [number, number][] = [
  [200, 0.02],
  [2000, 0.15],
  [8000, 0.4],
  [Infinity, 1],
];

export const startSeconds = (columns: number, limitSeconds: number): number =>
  Math.min(limitSeconds / 5, START_SECONDS.find(([upTo]) => columns < upTo)?.[1] ?? 1);
