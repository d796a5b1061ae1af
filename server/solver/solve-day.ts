import { Worker } from 'node:worker_threads';
import { planContext } from '../../shared/schedule/context.ts';
import { changesOf } from './changes.ts';
import { proofWords } from './proof-words.ts';
import type { Provenance, SolvedContact, SolveInput, SolveResult } from './planned.ts';
import type { PlannerMessage, PlannerTask } from './worker-messages.ts';

export type { SolvedContact, SolveInput, SolveResult } from './planned.ts';

export interface SolveControl {
  signal: AbortSignal;
  onProgress: (fraction: number, step: string) => void;
}

/** The solver's own time limit is late by a second or two; after this it is ended from outside, ms. */
const GRACE_MS = 3000;
/** After a cancel it is given this long to hand over its best plan, ms. */
const CANCEL_GRACE_MS = 2000;
/** The solver's memory cannot grow beyond 2 GiB; the rest of the thread stays small. */
const HEAP_MIB = 1024;

const isTs = import.meta.url.endsWith('.ts');
const workerUrl = new URL(
  isTs ? '../workers/planner.worker.ts' : './planner.worker.js',
  import.meta.url,
);

/** From sources the thread must learn to read TypeScript. */
const registerUrl = new URL('../workers/register-tsx.mjs', import.meta.url);

function start(task: PlannerTask): Worker {
  return new Worker(workerUrl, {
    workerData: task,
    execArgv: isTs ? ['--import', registerUrl.href] : [],
    resourceLimits: { maxOldGenerationSizeMb: HEAP_MIB },
  });
}

interface Posted {
  contacts: SolvedContact[];
  objective: number;
}

/** The last plan that was posted, when the run had to be ended from outside: valid, without a bound. */
function lastPlan(
  input: SolveInput,
  { contacts, objective }: Posted,
  provenance: Provenance,
  seconds: number,
): SolveResult {
  const context = planContext(input.day, input.facts);
  const limitSeconds = input.timeLimitSeconds;
  const proof = {
    provenance,
    gap: null,
    levels: [],
    limitSeconds,
    gridSeconds: null,
    wholeOnly: false,
  };
  return {
    contacts,
    objective,
    bound: null,
    gap: null,
    provenance,
    seconds,
    columns: 0,
    gridSeconds: null,
    words: proofWords(context, contacts, proof, []),
    changes: changesOf(context, input.current, contacts),
    locksSetAside: [],
  };
}

/** One run in one thread, from start to end; settles once. */
class Run {
  private latest: Posted | null = null;
  private readonly stop = new SharedArrayBuffer(4);
  private readonly worker: Worker;
  private readonly began = performance.now();
  private readonly input: SolveInput;
  private readonly control: SolveControl;
  private timer: NodeJS.Timeout | null = null;

  constructor(input: SolveInput, control: SolveControl) {
    this.input = input;
    this.control = control;
    this.worker = start({ input, stop: this.stop });
  }

  async result(): Promise<SolveResult> {
    const { signal } = this.control;
    try {
      return await new Promise<SolveResult>((resolve, reject) => {
        const giveUp = (provenance: Provenance): void => {
          const seconds = (performance.now() - this.began) / 1000;
          if (this.latest) resolve(lastPlan(this.input, this.latest, provenance, seconds));
          else reject(new Error('The planner had no plan when it was ended.'));
        };
        this.endAfter(this.input.timeLimitSeconds * 1000 + GRACE_MS, () => giveUp('time-limit'));
        const cancel = (): void => {
          Atomics.store(new Int32Array(this.stop), 0, 1);
          this.endAfter(CANCEL_GRACE_MS, () => giveUp('cancelled'));
        };
        if (signal.aborted) cancel();
        signal.addEventListener('abort', cancel, { once: true });
        this.worker.on('message', (message: PlannerMessage) => this.hear(message, resolve, reject));
        this.worker.on('error', (error: Error) =>
          reject(new Error(`The planner crashed: ${error.message}`)),
        );
        this.worker.on('exit', (code) =>
          reject(new Error(`The planner ended without a plan (exit ${code}).`)),
        );
      });
    } finally {
      if (this.timer) clearTimeout(this.timer);
      await this.worker.terminate();
    }
  }

  private endAfter(ms: number, end: () => void): void {
    if (this.timer) clearTimeout(this.timer);
    this.timer = setTimeout(end, ms);
  }

  private hear(
    message: PlannerMessage,
    resolve: (result: SolveResult) => void,
    reject: (error: Error) => void,
  ): void {
    if (message.type === 'progress') this.control.onProgress(message.fraction, message.step);
    else if (message.type === 'plan') this.latest = message;
    else if (message.type === 'result') resolve(message.result);
    else reject(new Error(`The planner failed: ${message.message}`));
  }
}

/**
 * Assigns the day's passes to channels in a thread of its own. Resolves with a plan in every ordinary case: proven, at
 * the time limit, by search alone or, after a cancel, the best found so far. Rejects when the thread crashes, runs out
 * of memory or the solver refuses the model; the plan in the database is untouched then.
 */
export const solveDay = (input: SolveInput, control: SolveControl): Promise<SolveResult> =>
  new Run(input, control).result();
