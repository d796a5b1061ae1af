/** The only source of "now". Tests and the demo set it; it then runs on. */
export interface Clock {
  now(): number;
}

export const systemClock: Clock = { now: () => Date.now() };

/** Starts at an instant and runs on from there. */
export const clockFrom = (startMs: number): Clock => {
  const offset = startMs - Date.now();
  return { now: () => Date.now() + offset };
};

/** Stands still until it is set. */
export class SettableClock implements Clock {
  #nowMs: number;
  constructor(nowMs: number) {
    this.#nowMs = nowMs;
  }
  now(): number {
    return this.#nowMs;
  }
  set(nowMs: number): void {
    this.#nowMs = nowMs;
  }
}
