import type { Assignment, Column, Conflict } from './assignment.ts';
import { maximalCliques, type Occupant } from './cliques.ts';

/** sum of coefficients (1 where null) times chosen columns <= limit. */
export interface HardRow {
  members: number[];
  coefficients: number[] | null;
  limit: number;
}

/** How many of the columns could be chosen together at most, seen from their families alone. */
function mostTogether(assignment: Assignment, members: readonly number[]): number {
  const families = new Set<number>();
  let free = 0;
  for (const member of members) {
    const family = assignment.columns[member]?.family ?? -1;
    if (assignment.families[family]?.limit === 1) families.add(family);
    else free++;
  }
  return families.size + free;
}

function resourceRows(assignment: Assignment): HardRow[] {
  const occupants: Occupant[][] = assignment.resources.map(() => []);
  for (const [column, { uses }] of assignment.columns.entries())
    for (const { resource, from, to } of uses) occupants[resource]?.push({ column, from, to });
  return assignment.resources.flatMap((resource, index) =>
    maximalCliques(occupants[index] ?? [], resource.cuts)
      .map(({ members, taken }) => ({
        members,
        coefficients: null,
        limit: Math.max(0, resource.capacity - taken),
      }))
      .filter(({ members, limit }) => mostTogether(assignment, members) > limit),
  );
}

function familyRows(assignment: Assignment): HardRow[] {
  const members: number[][] = assignment.families.map(() => []);
  for (const [index, column] of assignment.columns.entries()) members[column.family]?.push(index);
  return assignment.families.flatMap(({ limit }, family) => {
    const own = members[family] ?? [];
    return limit !== null && own.length > limit
      ? [{ members: own, coefficients: null, limit }]
      : [];
  });
}

/** Where each family's columns have a beam on: by beam, then by family. */
class BeamIndex {
  private readonly byKey = new Map<string, Occupant[]>();
  constructor(columns: readonly Column[]) {
    for (const [column, { family, beams }] of columns.entries())
      for (const { beam, from, to } of beams) {
        const key = `${beam}|${family}`;
        const list = this.byKey.get(key);
        if (list) list.push({ column, from, to });
        else this.byKey.set(key, [{ column, from, to }]);
      }
  }
  /** On at one instant. */
  at(beam: number, family: number, time: number): Occupant[] {
    const uses = this.byKey.get(`${beam}|${family}`) ?? [];
    return uses.filter(({ from, to }) => from <= time && time < to);
  }
  during(beam: number, family: number, from: number, to: number): Occupant[] {
    return (this.byKey.get(`${beam}|${family}`) ?? [])
      .filter((use) => use.from < to && use.to > from)
      .map((use) => ({ ...use, from: Math.max(use.from, from), to: Math.min(use.to, to) }));
  }
}

/** Conflicts of a beam by family, to lift a pair to everything that is in conflict with all of it at an instant. */
function conflictsByFamily(conflicts: readonly Conflict[]): Map<string, Conflict[]> {
  const index = new Map<string, Conflict[]>();
  for (const conflict of conflicts)
    for (const family of [conflict.a, conflict.b]) {
      const key = `${conflict.beam}|${family}`;
      const list = index.get(key);
      if (list) list.push(conflict);
      else index.set(key, [conflict]);
    }
  return index;
}

const otherOf = (conflict: Conflict, family: number): number =>
  conflict.a === family ? conflict.b : conflict.a;

function conflictRows(assignment: Assignment): HardRow[] {
  const beams = new BeamIndex(assignment.columns);
  const byFamily = conflictsByFamily(assignment.conflicts);
  const around = (beam: number, family: number, at: number): number[] =>
    (byFamily.get(`${beam}|${family}`) ?? [])
      .filter(({ from, to }) => from <= at && at < to)
      .map((conflict) => otherOf(conflict, family));
  const seen = new Set<string>();
  const rows: HardRow[] = [];
  for (const { beam, a, b, from, to } of assignment.conflicts) {
    const [ofA, ofB] = [beams.during(beam, a, from, to), beams.during(beam, b, from, to)];
    for (const clique of maximalCliques([...ofA, ...ofB], [])) {
      const families = [a, b];
      for (const next of around(beam, a, clique.from)) {
        const withAll = families.every(
          (family) => family !== next && around(beam, family, clique.from).includes(next),
        );
        if (withAll) families.push(next);
      }
      const lifted = families.slice(2).flatMap((family) => beams.at(beam, family, clique.from));
      const members = [...clique.members, ...lifted.map(({ column }) => column)];
      if (mostTogether(assignment, members) <= 1) continue;
      const key = members.sort((x, y) => x - y).join(',');
      if (seen.has(key)) continue;
      seen.add(key);
      rows.push({ members, coefficients: null, limit: 1 });
    }
  }
  return rows;
}

/** Every hard rule of the problem as rows over the chosen columns; rows that cannot bind are left out. */
export function hardRows(assignment: Assignment): HardRow[] {
  const maximums = assignment.maximums.map(({ members, amounts, most }) => ({
    members,
    coefficients: amounts,
    limit: most,
  }));
  return [
    ...familyRows(assignment),
    ...resourceRows(assignment),
    ...conflictRows(assignment),
    ...maximums,
  ];
}
