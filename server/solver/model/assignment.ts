/**
 * The assignment problem without any word of antennas: columns to choose, resources they use for a while, pairs that
 * must not be on together, and amounts that are asked. Times are plain numbers of one unit; intervals are half-open.
 */
export interface Use {
  resource: number;
  from: number;
  to: number;
}

/** A part of a resource that is taken already: closed channels, fixed contacts. */
export interface Cut {
  from: number;
  to: number;
  amount: number;
}

/** So many identical things, each used by one column at a time: the channels of a group, the transmit beams of a face. */
export interface Resource {
  name: string;
  capacity: number;
  cuts: Cut[];
}

/** A beam that is on: a pass on one face in one direction. */
export interface BeamUse {
  beam: number;
  from: number;
  to: number;
}

export interface Column {
  /** The pass. */
  family: number;
  uses: Use[];
  beams: BeamUse[];
  value: number;
}

/** The passes of a family bear at most `limit` contacts; null: as many as do not overlap. */
export interface Family {
  limit: number | null;
}

/** While it lasts, columns of the families a and b must not both be on with this beam (face and direction). */
export interface Conflict {
  beam: number;
  a: number;
  b: number;
  from: number;
  to: number;
}

/** A step of the price of what is missing; prices grow from piece to piece, so the sum is convex. */
export interface ShortfallPiece {
  size: number;
  cost: number;
}

/** At least so much of an amount, at a price for what is missing. Lower levels are satisfied first. */
export interface Demand {
  name: string;
  level: number;
  members: number[];
  amounts: number[];
  least: number;
  pieces: ShortfallPiece[];
  /** The whole price falls due as soon as anything is missing. */
  whole?: boolean;
}

/** Never more than so much. */
export interface Maximum {
  name: string;
  members: number[];
  amounts: number[];
  most: number;
}

export interface Assignment {
  resources: Resource[];
  families: Family[];
  columns: Column[];
  conflicts: Conflict[];
  demands: Demand[];
  maximums: Maximum[];
}

/** What a shortfall variable costs when it stands at its upper bound's unit: a whole demand has one that is 0 or 1. */
export const pieceCost = ({ whole }: Pick<Demand, 'whole'>, piece: ShortfallPiece): number =>
  whole ? piece.size * piece.cost : piece.cost;

/** Price of a demand that gets `given` of what it asks. */
export function shortfallCost(
  demand: Pick<Demand, 'least' | 'pieces' | 'whole'>,
  given: number,
): number {
  let missing = Math.max(0, demand.least - given);
  let cost = 0;
  for (const piece of demand.pieces) {
    const part = demand.whole && missing > 1e-9 ? piece.size : Math.min(missing, piece.size);
    cost += part * piece.cost;
    missing -= part;
  }
  return cost;
}
