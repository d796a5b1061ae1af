import type { Cut } from './assignment.ts';

export interface Occupant {
  column: number;
  from: number;
  to: number;
}

/** Occupants that share at least one instant, and the instants they all share. */
export interface Clique {
  members: number[];
  /** What fixed things take in it. */
  taken: number;
  from: number;
  to: number;
}

interface Edge {
  time: number;
  starts: boolean;
  column: number;
  amount: number;
}

function edgesOf(occupants: readonly Occupant[], cuts: readonly Cut[]): Edge[] {
  const edges: Edge[] = [];
  const push = (from: number, to: number, column: number, amount: number): void => {
    edges.push({ time: from, starts: true, column, amount });
    edges.push({ time: to, starts: false, column, amount });
  };
  for (const { column, from, to } of occupants) if (from < to) push(from, to, column, 0);
  for (const { from, to, amount } of cuts) if (from < to) push(from, to, -1, amount);
  // Half-open intervals: what ends at an instant has left before what starts then.
  return edges.sort((a, b) => a.time - b.time || Number(a.starts) - Number(b.starts));
}

/**
 * All maximal cliques of an interval graph by one sweep: a clique is complete where, after a start, something ends.
 * Cuts take part as members, so a row per clique says everything the resource can say.
 */
export function maximalCliques(occupants: readonly Occupant[], cuts: readonly Cut[]): Clique[] {
  const cliques: Clique[] = [];
  const active = new Set<number>();
  let [taken, grew, lastStart] = [0, false, -Infinity];
  for (const edge of edgesOf(occupants, cuts)) {
    if (edge.starts) {
      if (edge.column >= 0) active.add(edge.column);
      taken += edge.amount;
      [grew, lastStart] = [true, edge.time];
      continue;
    }
    if (grew && active.size > 0)
      cliques.push({ members: [...active], taken, from: lastStart, to: edge.time });
    grew = false;
    if (edge.column >= 0) active.delete(edge.column);
    taken -= edge.amount;
  }
  return cliques;
}
