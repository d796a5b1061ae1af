import type { Assignment } from './assignment.ts';
import type { HardRow } from './rows.ts';

/** A mixed-integer program in rows, ready for the solver: first the columns (0/1), then the shortfall pieces. */
export interface Program {
  binaries: number;
  variables: number;
  upper: Float64Array;
  /** 1 where a variable must be whole. */
  integrality: Int32Array;
  rowLower: Float64Array;
  rowUpper: Float64Array;
  starts: Int32Array;
  indices: Int32Array;
  values: Float64Array;
  /** First shortfall variable of each demand. */
  firstPiece: number[];
}

/** A row that limits a weighted sum of variables; used to hold what earlier phases reached. */
export interface ExtraRow {
  indices: number[];
  values: number[];
  upper: number;
}

class RowWriter {
  private readonly starts = [0];
  private readonly indices: number[] = [];
  private readonly values: number[] = [];
  private readonly lower: number[] = [];
  private readonly upper: number[] = [];
  add(
    indices: readonly number[],
    values: readonly number[] | null,
    lower: number,
    upper: number,
  ): void {
    for (const [position, index] of indices.entries()) {
      this.indices.push(index);
      this.values.push(values ? (values[position] ?? 0) : 1);
    }
    this.starts.push(this.indices.length);
    this.lower.push(lower);
    this.upper.push(upper);
  }
  finish(): Pick<Program, 'starts' | 'indices' | 'values' | 'rowLower' | 'rowUpper'> {
    return {
      starts: Int32Array.from(this.starts),
      indices: Int32Array.from(this.indices),
      values: Float64Array.from(this.values),
      rowLower: Float64Array.from(this.lower),
      rowUpper: Float64Array.from(this.upper),
    };
  }
}

/** The program of an assignment and its hard rows; the objective comes with each solve. */
export function makeProgram(
  assignment: Assignment,
  rows: readonly HardRow[],
  extra: readonly ExtraRow[] = [],
): Program {
  const binaries = assignment.columns.length;
  const writer = new RowWriter();
  const upper: number[] = assignment.columns.map(() => 1);
  const integrality: number[] = assignment.columns.map(() => 1);
  const firstPiece: number[] = [];
  for (const row of rows) writer.add(row.members, row.coefficients, -Infinity, row.limit);
  for (const demand of assignment.demands) {
    const first = upper.length;
    firstPiece.push(first);
    for (const piece of demand.pieces) {
      upper.push(demand.whole ? 1 : piece.size);
      integrality.push(demand.whole ? 1 : 0);
    }
    const pieces = demand.pieces.map((_, index) => first + index);
    writer.add(
      [...demand.members, ...pieces],
      [...demand.amounts, ...demand.pieces.map(({ size }) => (demand.whole ? size : 1))],
      demand.least,
      Infinity,
    );
  }
  for (const row of extra) writer.add(row.indices, row.values, -Infinity, row.upper);
  return {
    binaries,
    variables: upper.length,
    upper: Float64Array.from(upper),
    integrality: Int32Array.from(integrality),
    firstPiece,
    ...writer.finish(),
  };
}

/** A full set of variable values of a choice of columns: the pieces take up what the demands lack. */
export function startValues(
  assignment: Assignment,
  program: Program,
  chosen: readonly number[],
): Float64Array {
  const values = new Float64Array(program.variables);
  for (const column of chosen) values[column] = 1;
  for (const [index, demand] of assignment.demands.entries()) {
    let given = 0;
    for (const [position, member] of demand.members.entries())
      given += (values[member] ?? 0) * (demand.amounts[position] ?? 0);
    let missing = Math.max(0, demand.least - given);
    for (const [position, { size }] of demand.pieces.entries()) {
      const part = demand.whole && missing > 1e-9 ? size : Math.min(missing, size);
      values[(program.firstPiece[index] ?? 0) + position] = demand.whole ? part / size : part;
      missing -= part;
    }
  }
  return values;
}
