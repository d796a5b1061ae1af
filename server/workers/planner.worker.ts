/**
 * The planner's own thread: one run, then it ends. The solver blocks it; the main thread stops it through the shared
 * flag and, if that does not help, by terminating it. Every better plan is posted, so nothing found is lost.
 */
import { parentPort, workerData } from 'node:worker_threads';
import { planDay } from '../solver/plan-day.ts';
import type { PlannerMessage, PlannerTask } from '../solver/worker-messages.ts';

/** Better plans are posted at most this often, ms. */
const POST_EVERY_MS = 300;

const post = (message: PlannerMessage): void => parentPort?.postMessage(message);

async function run({ input, stop }: PlannerTask): Promise<void> {
  const flag = new Int32Array(stop);
  let posted = -Infinity;
  const result = await planDay(input, {
    now: () => performance.now(),
    shouldStop: () => Atomics.load(flag, 0) !== 0,
    onProgress: (fraction, step) => post({ type: 'progress', fraction, step }),
    onPlan: (contacts, objective) => {
      if (performance.now() - posted < POST_EVERY_MS) return;
      posted = performance.now();
      post({ type: 'plan', contacts, objective });
    },
  });
  post({ type: 'result', result });
}

try {
  // The main thread is the only sender of this data.
  await run(workerData as PlannerTask);
} catch (error) {
  // Only the message: an abort inside the solver carries its whole source.
  post({
    type: 'failed',
    message: error instanceof Error ? error.message.slice(0, 300) : 'unknown',
  });
}
