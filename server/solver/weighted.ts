import type { RunControl } from './control.ts';
import { pieceCost, shortfallCost, type Assignment } from './model/assignment.ts';
import { solveProgram, type ProgramAnswer } from './model/highs-solve.ts';
import { makeProgram, startValues, type Program } from './model/program.ts';
import { hardRows } from './model/rows.ts';
import { searchProblem } from './search/plan-state.ts';
import { findStart, startSeconds } from './warm-start.ts';

export interface WeightedResult {
  columns: number[];
  objective: number;
  bound: number | null;
  status: ProgramAnswer['status'];
}

/** Value of a choice of columns minus the prices of what it leaves missing. */
export function weightedObjective(assignment: Assignment, chosen: readonly number[]): number {
  const on = new Set(chosen);
  const value = chosen.reduce((sum, column) => sum + (assignment.columns[column]?.value ?? 0), 0);
  const cost = assignment.demands.reduce((sum, demand) => {
    const given = demand.members.reduce(
      (total, member, position) => total + (on.has(member) ? (demand.amounts[position] ?? 0) : 0),
      0,
    );
    return sum + shortfallCost(demand, given);
  }, 0);
  return value - cost;
}

function objectiveOf(assignment: Assignment, program: Program): Float64Array {
  const objective = new Float64Array(program.variables);
  for (const [index, { value }] of assignment.columns.entries()) objective[index] = value;
  for (const [index, demand] of assignment.demands.entries())
    for (const [position, piece] of demand.pieces.entries())
      objective[(program.firstPiece[index] ?? 0) + position] = -pieceCost(demand, piece);
  return objective;
}

/** Columns that stand at one in a set of variable values. */
export const chosenOf = (values: Float64Array, binaries: number): number[] => {
  const chosen: number[] = [];
  for (let column = 0; column < binaries; column++)
    if ((values[column] ?? 0) > 0.5) chosen.push(column);
  return chosen;
};

/** The best plan by one weighted sum: values minus prices of shortfalls, all levels alike. */
export async function solveWeighted(
  assignment: Assignment,
  limitSeconds: number,
  control: RunControl,
): Promise<WeightedResult> {
  const began = control.now();
  const rows = hardRows(assignment);
  const problem = searchProblem(assignment, rows, () => 1);
  const seconds = startSeconds(assignment.columns.length, limitSeconds);
  const start = findStart(problem, [], seconds, control);
  const program = makeProgram(assignment, rows);
  if (program.variables === 0) return { columns: [], objective: 0, bound: 0, status: 'optimal' };
  const answer = await solveProgram({
    program,
    objective: objectiveOf(assignment, program),
    start: startValues(assignment, program, start),
    timeLimitSeconds: Math.max(0.1, limitSeconds - (control.now() - began) / 1000),
    relativeGap: 0,
    shouldStop: control.shouldStop,
    onIncumbent: (values) => control.onIncumbent(chosenOf(values, program.binaries)),
  });
  const columns = answer.values ? chosenOf(answer.values, program.binaries) : start;
  const objective = weightedObjective(assignment, columns);
  const kept = weightedObjective(assignment, start) > objective ? start : columns;
  return {
    columns: kept,
    objective: weightedObjective(assignment, kept),
    bound: answer.bound,
    status: answer.status,
  };
}
