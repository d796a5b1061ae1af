import type { RunControl } from './control.ts';
import { pieceCost, shortfallCost, type Assignment, type Demand } from './model/assignment.ts';
import { solveProgram, type ProgramAnswer } from './model/highs-solve.ts';
import { makeProgram, startValues, type ExtraRow, type Program } from './model/program.ts';
import { hardRows, type HardRow } from './model/rows.ts';
import { searchProblem } from './search/plan-state.ts';
import { findStart, startSeconds } from './warm-start.ts';
import { chosenOf } from './weighted.ts';

/** How far the demands of one level are met, and how far they could be at best. */
export interface LevelResult {
  level: number;
  /** Price of what is missing. */
  missing: number;
  /** Proven: no plan that does as well on the levels before misses less. */
  leastMissing: number;
  proven: boolean;
}

export interface LexicographicResult {
  columns: number[];
  value: number;
  /** Proven for every plan that meets the levels as well as this one (all of them proven), else for every plan. */
  valueBound: number | null;
  levels: LevelResult[];
  /** Who made the plan: the solver, or only the search. */
  bySolver: boolean;
  status: ProgramAnswer['status'];
}

const TOLERANCE = 1e-6;

const givenOf = (demand: Demand, on: ReadonlySet<number>): number =>
  demand.members.reduce(
    (sum, member, position) => sum + (on.has(member) ? (demand.amounts[position] ?? 0) : 0),
    0,
  );

/** Price of what a plan misses on one level. */
export function missingOn(
  { demands }: Assignment,
  level: number,
  columns: readonly number[],
): number {
  const on = new Set(columns);
  return demands
    .filter((demand) => demand.level === level)
    .reduce((sum, demand) => sum + shortfallCost(demand, givenOf(demand, on)), 0);
}

export const valueOf = ({ columns }: Assignment, chosen: readonly number[]): number =>
  chosen.reduce((sum, column) => sum + (columns[column]?.value ?? 0), 0);

/** What a demand could get at most if it were alone: the best column of each pass that bears one contact. */
function mostFor(assignment: Assignment, demand: Demand): number {
  const best = new Map<number, number>();
  let sum = 0;
  for (const [position, member] of demand.members.entries()) {
    const amount = demand.amounts[position] ?? 0;
    const family = assignment.columns[member]?.family ?? -1;
    if (assignment.families[family]?.limit !== 1) sum += amount;
    else best.set(family, Math.max(best.get(family) ?? 0, amount));
  }
  return [...best.values()].reduce((total, amount) => total + amount, sum);
}

/** What must be missing on a level whatever one does. */
const unavoidable = (assignment: Assignment, level: number): number =>
  assignment.demands
    .filter((demand) => demand.level === level)
    .reduce((sum, demand) => sum + shortfallCost(demand, mostFor(assignment, demand)), 0);

/** Weights that make the search prefer earlier levels by far. */
const searchWeight =
  (levels: readonly number[]) =>
  (level: number): number =>
    1e6 * 20 ** (levels.length - 1 - levels.indexOf(level));

class Phases {
  columns: number[];
  bySolver = false;
  readonly levels: LevelResult[] = [];
  private readonly held: ExtraRow[] = [];
  private readonly assignment: Assignment;
  private readonly rows: readonly HardRow[];
  private readonly control: RunControl;
  private readonly deadline: number;

  constructor(
    assignment: Assignment,
    rows: readonly HardRow[],
    start: number[],
    control: RunControl,
    deadline: number,
  ) {
    this.assignment = assignment;
    this.rows = rows;
    this.columns = start;
    this.control = control;
    this.deadline = deadline;
  }

  private secondsLeft(): number {
    return (this.deadline - this.control.now()) / 1000;
  }

  private async run(
    objective: (program: Program) => Float64Array,
    share: number,
    relativeGap: number,
    onIncumbent: (values: Float64Array) => void = () => undefined,
  ): Promise<ProgramAnswer> {
    const program = makeProgram(this.assignment, this.rows, this.held);
    return solveProgram({
      program,
      objective: objective(program),
      start: startValues(this.assignment, program, this.columns),
      timeLimitSeconds: Math.max(0.1, this.secondsLeft() * share),
      relativeGap,
      shouldStop: this.control.shouldStop,
      onIncumbent,
    });
  }

  /** Prices of a level's shortfall variables, as positions and values. */
  private prices(program: Program, level: number): { indices: number[]; values: number[] } {
    const indices: number[] = [];
    const values: number[] = [];
    for (const [index, demand] of this.assignment.demands.entries()) {
      if (demand.level !== level) continue;
      for (const [position, piece] of demand.pieces.entries()) {
        indices.push((program.firstPiece[index] ?? 0) + position);
        values.push(pieceCost(demand, piece));
      }
    }
    return { indices, values };
  }

  /** Brings one level's shortfall down as far as it goes and holds it there. */
  async settle(level: number, gap: number): Promise<void> {
    const least = unavoidable(this.assignment, level);
    const before = missingOn(this.assignment, level, this.columns);
    let proof = before <= least + TOLERANCE ? before : least;
    if (before > least + TOLERANCE && this.secondsLeft() > 0 && !this.control.shouldStop()) {
      const answer = await this.run(
        (program) => {
          const objective = new Float64Array(program.variables);
          const { indices, values } = this.prices(program, level);
          for (const [position, index] of indices.entries())
            objective[index] = -(values[position] ?? 0);
          return objective;
        },
        0.5,
        gap,
      );
      this.adopt(answer, (columns) => -missingOn(this.assignment, level, columns));
      if (answer.bound !== null) proof = Math.max(proof, -answer.bound);
    }
    const missing = missingOn(this.assignment, level, this.columns);
    const proven = missing <= proof + 1e-4 * Math.max(1, missing);
    this.levels.push({ level, missing, leastMissing: Math.min(missing, proof), proven });
    this.hold(level, missing);
  }

  private hold(level: number, missing: number): void {
    const program = makeProgram(this.assignment, [], []);
    this.held.push({ ...this.prices(program, level), upper: missing + TOLERANCE });
  }

  private adopt(answer: ProgramAnswer, worth: (columns: number[]) => number): void {
    if (!answer.values) return;
    const columns = chosenOf(answer.values, this.assignment.columns.length);
    if (worth(columns) < worth(this.columns) - TOLERANCE) return;
    this.columns = columns;
    this.bySolver = true;
    this.control.onIncumbent(columns);
  }

  /** The most valuable plan among those that meet every level as well. */
  async maximise(gap: number): Promise<ProgramAnswer | null> {
    if (this.secondsLeft() <= 0 || this.control.shouldStop()) return null;
    const answer = await this.run(
      (program) => {
        const objective = new Float64Array(program.variables);
        for (const [index, { value }] of this.assignment.columns.entries())
          objective[index] = value;
        return objective;
      },
      1,
      gap,
      (values) => this.control.onIncumbent(chosenOf(values, this.assignment.columns.length)),
    );
    this.adopt(answer, (columns) => valueOf(this.assignment, columns));
    return answer;
  }
}

/** Above this many columns the proof may stop at a hundredth of a per cent. */
const FINE_GAP_COLUMNS = 8000;

/**
 * Levels first, one after the other, then value: the strict order of the goals, each phase held by a row in the next.
 * Starts from a valid plan of the search, so a plan is there from the first second on.
 */
export async function solveLexicographic(
  assignment: Assignment,
  given: readonly number[],
  limitSeconds: number,
  control: RunControl,
): Promise<LexicographicResult> {
  const deadline = control.now() + limitSeconds * 1000;
  const rows = hardRows(assignment);
  const levels = [...new Set(assignment.demands.map(({ level }) => level))].sort((a, b) => a - b);
  const problem = searchProblem(assignment, rows, searchWeight(levels));
  const seconds = startSeconds(assignment.columns.length, limitSeconds);
  control.onStep?.(0.1, 'Searching a first plan');
  const start = findStart(problem, given, seconds, control);
  const phases = new Phases(assignment, rows, start, control, deadline);
  if (assignment.columns.length === 0)
    return { columns: [], value: 0, valueBound: 0, levels: [], bySolver: true, status: 'optimal' };
  const gap = assignment.columns.length > FINE_GAP_COLUMNS ? 1e-4 : 1e-7;
  for (const [index, level] of levels.entries()) {
    control.onStep?.(0.2 + (0.4 * index) / levels.length, 'Meeting what is asked');
    await phases.settle(level, gap);
  }
  control.onStep?.(0.6, 'Proving the best plan');
  const answer = await phases.maximise(gap);
  return {
    columns: phases.columns,
    value: valueOf(assignment, phases.columns),
    valueBound: answer?.bound ?? null,
    levels: phases.levels,
    bySolver: phases.bySolver,
    status: answer?.status ?? (control.shouldStop() ? 'interrupted' : 'time-limit'),
  };
}
