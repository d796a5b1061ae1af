/** What reading an element file yields; pure data, no clock involved. */

/** One element set as read, in the units of its file. */
export interface ReadElementSet {
  /** Line of the file where the elements begin, 1-based. */
  line: number;
  name: string | null;
  /** Alpha-5 decoded. */
  catalogNumber: number;
  /** Exact epoch, ms UTC, fractional. */
  epochMs: number;
  /** As in the file; for other forms than two-line the same elements in that form (`element-files/two-line-form.ts`). */
  line1: string;
  line2: string;
  meanMotionRevPerDay: number;
  eccentricity: number;
  inclinationDeg: number;
  raanDeg: number;
  argumentOfPerigeeDeg: number;
  meanAnomalyDeg: number;
  /** Drag term, 1/Earth radii. */
  bstar: number;
}

/** Why something was refused, where (1-based) and what to do about it. */
export interface ElementFault {
  line: number;
  column: number;
  /** Stable code, for example `TLE_CHECKSUM`. */
  code: string;
  reason: string;
}

/** Two-line elements, or orbit mean-elements messages (CCSDS 502.0-B-3) in one of their forms. */
export type ElementFormat = 'tle' | 'omm-json' | 'omm-csv' | 'omm-kvn' | 'omm-xml';

export interface ElementSetReading {
  format: ElementFormat;
  accepted: ReadElementSet[];
  refused: ElementFault[];
  /** The structure of the file is at fault: nothing in it is used. */
  unreadable: boolean;
}
