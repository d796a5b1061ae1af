import type { SolvedContact, SolveInput, SolveResult } from './planned.ts';

/** What the planner's thread is given when it starts. */
export interface PlannerTask {
  input: SolveInput;
  /** One flag: not 0 asks for the end of the run. */
  stop: SharedArrayBuffer;
}

/** What it tells. */
export type PlannerMessage =
  | { type: 'progress'; fraction: number; step: string }
  | { type: 'plan'; contacts: SolvedContact[]; objective: number }
  | { type: 'result'; result: SolveResult }
  | { type: 'failed'; message: string };
