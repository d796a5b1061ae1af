import { shortfallCost, type Assignment } from '../model/assignment.ts';
import type { HardRow } from '../model/rows.ts';

/** What a column does to one row or demand. */
interface Effect {
  index: number;
  amount: number;
}

/** An assignment with its rows turned around, so that a column knows what it touches. */
export interface SearchProblem {
  assignment: Assignment;
  rows: readonly HardRow[];
  rowEffects: Effect[][];
  demandEffects: Effect[][];
  familyColumns: number[][];
  /** Price of a unit of shortfall cost of each demand, in the unit of value. */
  demandWeights: number[];
}

export function searchProblem(
  assignment: Assignment,
  rows: readonly HardRow[],
  weightOfLevel: (level: number) => number,
): SearchProblem {
  const rowEffects: Effect[][] = assignment.columns.map(() => []);
  const demandEffects: Effect[][] = assignment.columns.map(() => []);
  const familyColumns: number[][] = assignment.families.map(() => []);
  for (const [index, row] of rows.entries())
    for (const [position, member] of row.members.entries())
      rowEffects[member]?.push({ index, amount: row.coefficients?.[position] ?? 1 });
  for (const [index, demand] of assignment.demands.entries())
    for (const [position, member] of demand.members.entries())
      demandEffects[member]?.push({ index, amount: demand.amounts[position] ?? 0 });
  for (const [index, { family }] of assignment.columns.entries())
    familyColumns[family]?.push(index);
  const demandWeights = assignment.demands.map(({ level }) => weightOfLevel(level));
  return { assignment, rows, rowEffects, demandEffects, familyColumns, demandWeights };
}

const EPSILON = 1e-9;

/** A valid plan under construction: it never breaks a hard row. Every change can be undone. */
export class PlanState {
  readonly chosen: Uint8Array;
  /** Value of the chosen columns minus the weighted prices of what is missing. */
  score: number;
  private readonly activity: Float64Array;
  private readonly given: Float64Array;
  private readonly journal: number[] = [];
  private readonly problem: SearchProblem;

  constructor(problem: SearchProblem) {
    this.problem = problem;
    this.chosen = new Uint8Array(problem.assignment.columns.length);
    this.activity = new Float64Array(problem.rows.length);
    this.given = new Float64Array(problem.assignment.demands.length);
    this.score = -problem.assignment.demands.reduce(
      (sum, demand, index) => sum + shortfallCost(demand, 0) * (problem.demandWeights[index] ?? 0),
      0,
    );
  }

  canAdd(column: number): boolean {
    if (this.chosen[column]) return false;
    for (const { index, amount } of this.problem.rowEffects[column] ?? [])
      if ((this.activity[index] ?? 0) + amount > (this.problem.rows[index]?.limit ?? 0) + EPSILON)
        return false;
    return true;
  }

  /** How much better the plan gets with the column (or, with sign -1, without it). */
  gain(column: number, sign: 1 | -1): number {
    let gain = sign * (this.problem.assignment.columns[column]?.value ?? 0);
    for (const { index, amount } of this.problem.demandEffects[column] ?? []) {
      const demand = this.problem.assignment.demands[index];
      if (!demand) continue;
      const given = this.given[index] ?? 0;
      const saved = shortfallCost(demand, given) - shortfallCost(demand, given + sign * amount);
      gain += saved * (this.problem.demandWeights[index] ?? 0);
    }
    return gain;
  }

  add(column: number): void {
    this.change(column, 1);
    this.journal.push(column);
  }

  remove(column: number): void {
    this.change(column, -1);
    this.journal.push(-column - 1);
  }

  private change(column: number, sign: 1 | -1): void {
    this.score += this.gain(column, sign);
    this.chosen[column] = sign > 0 ? 1 : 0;
    for (const { index, amount } of this.problem.rowEffects[column] ?? [])
      this.activity[index] = (this.activity[index] ?? 0) + sign * amount;
    for (const { index, amount } of this.problem.demandEffects[column] ?? [])
      this.given[index] = (this.given[index] ?? 0) + sign * amount;
  }

  mark(): number {
    return this.journal.length;
  }

  /** Takes back every change since the mark. */
  undoTo(mark: number): void {
    while (this.journal.length > mark) {
      const entry = this.journal.pop() ?? 0;
      if (entry >= 0) this.change(entry, -1);
      else this.change(-entry - 1, 1);
    }
  }

  forget(): void {
    this.journal.length = 0;
  }

  /** Chosen columns that must go so that the column fits; null when fixed parts alone stand in its way. */
  blockersOf(column: number): number[] | null {
    const out = new Set<number>();
    for (const { index, amount } of this.problem.rowEffects[column] ?? []) {
      const row = this.problem.rows[index];
      if (!row) continue;
      let excess = (this.activity[index] ?? 0) + amount - row.limit;
      if (excess <= EPSILON) continue;
      const inRow = row.members
        .map((member, position) => ({ member, amount: row.coefficients?.[position] ?? 1 }))
        .filter(({ member }) => this.chosen[member] === 1);
      for (const one of inRow) if (out.has(one.member)) excess -= one.amount;
      inRow.sort((a, b) => this.worth(a.member) - this.worth(b.member));
      for (const one of inRow) {
        if (excess <= EPSILON) break;
        if (out.has(one.member)) continue;
        out.add(one.member);
        excess -= one.amount;
      }
      if (excess > EPSILON) return null;
    }
    return [...out];
  }

  /** What the plan loses without a chosen column. */
  worth(column: number): number {
    return -this.gain(column, -1);
  }

  columns(): number[] {
    const list: number[] = [];
    for (const [column, on] of this.chosen.entries()) if (on) list.push(column);
    return list;
  }

  /** Price of what a demand is missing now. */
  missingOf(demand: number): number {
    const wanted = this.problem.assignment.demands[demand];
    return wanted ? shortfallCost(wanted, this.given[demand] ?? 0) : 0;
  }
}
