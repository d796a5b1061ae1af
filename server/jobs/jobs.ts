import { randomUUID } from 'node:crypto';
import { inTransaction, reader, type Deps, type Person } from '../deps.ts';
import { conflict, notFound } from '../errors.ts';
import { RunRow, type RunKind } from '../modules/runs/run.entity.ts';

export interface JobContext {
  runId: string;
  signal: AbortSignal;
  /** 0 to 1, with what is being done now. */
  progress: (fraction: number, step: string) => void;
}
export interface JobOutcome {
  result: Record<string, unknown>;
  proposal?: Record<string, unknown> | null;
  /** A cancelled job may still have something to offer. */
  cancelled?: boolean;
}
export type Job = (context: JobContext) => Promise<JobOutcome>;

interface Wish {
  /** Set when the run was named before it could begin. */
  id?: string;
  kind: RunKind;
  person: Pick<Person, 'id' | 'name'> | null;
  planId?: string;
  planVersion?: number;
  input: Record<string, unknown>;
}

interface Live {
  controller: AbortController;
  done: Promise<void>;
}

/** Progress is written at most this often. */
const PROGRESS_MS = 250;

/** Background work: a row for each run, one run of a kind after the other, cancel, and the end of what a stop cut off. */
export class Jobs {
  readonly #deps: Deps;
  readonly #live = new Map<string, Live>();
  readonly #queues = new Map<RunKind, Promise<void>>();
  #after: () => Promise<void> = () => Promise.resolve();

  constructor(deps: Deps) {
    this.#deps = deps;
  }

  /** Runs that a stop or a crash cut off are failed, so that nobody waits for them. */
  async recover(): Promise<void> {
    await reader(this.#deps).nativeUpdate(
      RunRow,
      { state: { $in: ['queued', 'running'] } },
      {
        state: 'failed',
        finishedMs: this.#deps.clock.now(),
        error: { code: 'interrupted', detail: 'The server stopped while it ran. Start it again.' },
      },
    );
  }

  /** Queues the job and resolves with the run's id when its row is written. */
  async start(wish: Wish, job: Job): Promise<string> {
    const id = wish.id ?? randomUUID();
    const controller = new AbortController();
    const written = this.#insert(id, wish);
    const before = this.#queues.get(wish.kind) ?? Promise.resolve();
    const done = before
      .then(() => written)
      .then(
        () => this.#execute(id, controller.signal, job),
        () => undefined,
      )
      .finally(() => this.#live.delete(id));
    this.#queues.set(wish.kind, done);
    this.#live.set(id, { controller, done });
    await written;
    return id;
  }

  #insert(id: string, wish: Wish): Promise<void> {
    return inTransaction(this.#deps, async ({ em, nowMs, tell }) => {
      em.create(RunRow, {
        id,
        kind: wish.kind,
        planId: wish.planId ?? null,
        planVersion: wish.planVersion ?? null,
        input: wish.input,
        startedById: wish.person?.id ?? null,
        startedByName: wish.person?.name ?? 'Skysheaf',
        createdMs: nowMs,
      });
      await em.flush();
      tell({ topic: 'run', id, version: 1 });
    });
  }

  async cancel(id: string): Promise<void> {
    const run = await reader(this.#deps).findOne(RunRow, id);
    if (!run) throw notFound('The run');
    const live = this.#live.get(id);
    if (!live) throw conflict('run-ended', 'The run has ended already.');
    live.controller.abort();
  }

  /** Resolves when the run has ended. */
  async settled(id: string): Promise<void> {
    await this.#live.get(id)?.done;
  }

  /** Work that follows from runs and is done when they are. */
  alsoWaitFor(work: () => Promise<void>): void {
    this.#after = work;
  }

  /** Resolves when nothing runs any more and what followed from it is done. */
  async idle(): Promise<void> {
    while (this.#live.size > 0) await Promise.all([...this.#live.values()].map((l) => l.done));
    await this.#after();
  }

  async stop(): Promise<void> {
    for (const live of this.#live.values()) live.controller.abort();
    await this.idle();
  }

  async #execute(id: string, signal: AbortSignal, job: Job): Promise<void> {
    try {
      if (signal.aborted) await this.#finish(id, { state: 'cancelled' });
      else await this.#run(id, signal, job);
    } catch (error) {
      this.#deps.log.error({ err: error, runId: id }, 'a run could not be recorded');
    }
  }

  async #run(id: string, signal: AbortSignal, job: Job): Promise<void> {
    await this.#write(id, { state: 'running' });
    const reporter = this.#reporter(id);
    try {
      const outcome = await job({ runId: id, signal, progress: reporter.report });
      await reporter.last();
      await this.#finish(id, {
        state: outcome.cancelled ? 'cancelled' : 'succeeded',
        progress: 1,
        result: outcome.result,
        proposal: outcome.proposal ?? null,
      });
    } catch (error) {
      await reporter.last();
      if (signal.aborted) await this.#finish(id, { state: 'cancelled' });
      else await this.#fail(id, error);
    }
  }

  async #fail(id: string, error: unknown): Promise<void> {
    this.#deps.log.error({ err: error, runId: id }, 'a run failed');
    const code =
      error instanceof Error && 'code' in error && typeof error.code === 'string'
        ? error.code
        : 'run-failed';
    const detail = error instanceof Error ? error.message.slice(0, 500) : 'It stopped working.';
    await this.#finish(id, { state: 'failed', error: { code, detail } });
  }

  #reporter(id: string) {
    let lastMs = 0;
    let writing: Promise<void> = Promise.resolve();
    return {
      report: (fraction: number, step: string) => {
        const nowMs = Date.now();
        if (nowMs - lastMs < PROGRESS_MS) return;
        lastMs = nowMs;
        writing = writing
          .then(() => this.#write(id, { progress: Math.min(1, Math.max(0, fraction)), step }))
          .catch(() => undefined);
      },
      last: () => writing,
    };
  }

  async #write(id: string, change: Partial<RunRow>): Promise<void> {
    await reader(this.#deps).nativeUpdate(RunRow, { id }, change);
    this.#deps.bus.emit([{ topic: 'run', id, version: 1 }]);
  }

  #finish(id: string, change: Partial<RunRow>): Promise<void> {
    return this.#write(id, { ...change, finishedMs: this.#deps.clock.now() });
  }
}
