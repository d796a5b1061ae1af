import type { PlanState, SearchProblem } from './plan-state.ts';

export interface SearchLimits {
  /** Instant of `now` at which the search ends. */
  deadline: number;
  now: () => number;
  random: () => number;
  shouldStop: () => boolean;
  onBetter: (columns: number[]) => void;
}

interface Span {
  from: number;
  to: number;
}

/** Where in time each family can be served; what does not use anything in time stands at 0. */
function familySpans({ assignment, familyColumns }: SearchProblem): Span[] {
  return familyColumns.map((columns) => {
    const uses = columns.flatMap((column) => assignment.columns[column]?.uses ?? []);
    if (uses.length === 0) return { from: 0, to: 0 };
    return {
      from: uses.reduce((least, { from }) => Math.min(least, from), Infinity),
      to: uses.reduce((most, { to }) => Math.max(most, to), -Infinity),
    };
  });
}

/** The column of a family that fits and gains most; null when none gains. */
function bestFitting(problem: SearchProblem, state: PlanState, family: number): number | null {
  let [best, bestGain] = [-1, 0];
  for (const column of problem.familyColumns[family] ?? []) {
    const gain = state.gain(column, 1);
    if (gain > bestGain && state.canAdd(column)) [best, bestGain] = [column, gain];
  }
  return best >= 0 ? best : null;
}

/** Serves families in the given order with what fits best; families that bear several contacts until nothing gains. */
function fill(problem: SearchProblem, state: PlanState, families: readonly number[]): void {
  for (const family of families) {
    const many = problem.assignment.families[family]?.limit !== 1;
    for (;;) {
      const column = bestFitting(problem, state, family);
      if (column === null) break;
      state.add(column);
      if (!many) break;
    }
  }
}

function shuffled(items: readonly number[], random: () => number): number[] {
  const list = [...items];
  for (let index = list.length - 1; index > 0; index--) {
    const other = Math.floor(random() * (index + 1));
    [list[index], list[other]] = [list[other] ?? 0, list[index] ?? 0];
  }
  return list;
}

/** Families by what their best column would gain alone, the most valuable first. */
export function greedyFill(problem: SearchProblem, state: PlanState): void {
  const promise = problem.familyColumns.map((columns) =>
    columns.reduce((best, column) => Math.max(best, state.gain(column, 1)), 0),
  );
  const order = [...promise.keys()].sort((a, b) => (promise[b] ?? 0) - (promise[a] ?? 0));
  fill(problem, state, order);
}

class Neighbourhoods {
  private readonly spans: Span[];
  private readonly problem: SearchProblem;
  private readonly state: PlanState;
  private readonly random: () => number;
  private readonly horizon: Span;

  constructor(problem: SearchProblem, state: PlanState, random: () => number) {
    this.problem = problem;
    this.state = state;
    this.random = random;
    this.spans = familySpans(problem);
    this.horizon = this.spans.reduce(
      (all, { from, to }) => ({ from: Math.min(all.from, from), to: Math.max(all.to, to) }),
      { from: Infinity, to: -Infinity },
    );
  }

  private near(span: Span): number[] {
    const found: number[] = [];
    for (const [family, { from, to }] of this.spans.entries())
      if (from < span.to && to > span.from) found.push(family);
    return found;
  }

  /** Takes everything out of a stretch of time and fills it anew in another order. */
  ruinTime(): void {
    const length = (this.horizon.to - this.horizon.from) * (0.005 + 0.03 * this.random());
    const from = this.horizon.from + this.random() * (this.horizon.to - this.horizon.from);
    const families = this.near({ from, to: from + length });
    const share = 0.3 + 0.7 * this.random();
    for (const family of families) {
      if (this.random() > share) continue;
      for (const column of this.problem.familyColumns[family] ?? [])
        if (this.state.chosen[column]) this.state.remove(column);
    }
    fill(this.problem, this.state, shuffled(families, this.random));
  }

  /** Forces a column in, throws out the cheapest of what is in its way, and fills around. */
  insert(column: number): void {
    const blockers = this.state.blockersOf(column);
    if (this.state.chosen[column] || blockers === null) return;
    for (const blocker of blockers) this.state.remove(blocker);
    if (!this.state.canAdd(column)) return;
    this.state.add(column);
    const { columns } = this.problem.assignment;
    const families = blockers.flatMap((blocker) => {
      const span = this.spans[columns[blocker]?.family ?? -1];
      return span ? this.near(span) : [];
    });
    fill(this.problem, this.state, shuffled([...new Set(families)], this.random));
  }

  /** A column of a demand that still misses something, else any column. */
  wantedColumn(): number {
    const { demands, columns } = this.problem.assignment;
    const start = Math.floor(this.random() * demands.length);
    for (let step = 0; step < demands.length; step++) {
      const index = (start + step) % demands.length;
      const { members } = demands[index] ?? { members: [] };
      if (members.length > 0 && this.state.missingOf(index) > 0)
        return members[Math.floor(this.random() * members.length)] ?? 0;
    }
    return Math.floor(this.random() * columns.length);
  }

  step(): void {
    const dice = this.random();
    if (dice < 0.4) this.ruinTime();
    else if (dice < 0.7) this.insert(this.wantedColumn());
    else this.insert(Math.floor(this.random() * this.problem.assignment.columns.length));
  }
}

/**
 * Improves a valid plan while time lasts: ruin and refill of stretches of time, insertion with ejection. A slightly
 * worse plan is accepted now and then so that the search does not stand still; the best one is kept and returned.
 */
export function improve(problem: SearchProblem, state: PlanState, limits: SearchLimits): number[] {
  let [best, bestScore] = [state.columns(), state.score];
  if (problem.assignment.columns.length === 0) return best;
  const moves = new Neighbourhoods(problem, state, limits.random);
  const slack = Math.max(1e-9, Math.abs(problem.assignment.columns[0]?.value ?? 1)) * 0.02;
  for (let round = 0; ; round++) {
    if (round % 8 === 0 && (limits.now() >= limits.deadline || limits.shouldStop())) break;
    state.forget();
    const before = state.score;
    moves.step();
    if (state.score < before - (limits.random() < 0.05 ? slack : 1e-9)) state.undoTo(0);
    if (state.score <= bestScore + 1e-9) continue;
    [best, bestScore] = [state.columns(), state.score];
    limits.onBetter(best);
  }
  return best;
}
