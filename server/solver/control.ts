/** What a solver run needs from outside: time, a way to be stopped, and somewhere to show better plans. */
export interface RunControl {
  /** Milliseconds, monotonic. */
  now: () => number;
  shouldStop: () => boolean;
  onIncumbent: (columns: number[]) => void;
  /** How far the run is, 0 to 1, and what it does now. */
  onStep?: (fraction: number, step: string) => void;
}
