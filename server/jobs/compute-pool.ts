import { fileURLToPath } from 'node:url';
import { Piscina } from 'piscina';
import type * as Tasks from '../workers/compute.worker.ts';

type TaskName = keyof typeof Tasks;
type Input<N extends TaskName> = Parameters<(typeof Tasks)[N]>[0];
type Output<N extends TaskName> = Awaited<ReturnType<(typeof Tasks)[N]>>;

/** From sources the workers are TypeScript, in the bundle they are JavaScript beside it. */
const isSource = import.meta.url.endsWith('.ts');
const workerFile = fileURLToPath(
  new URL(isSource ? '../workers/compute.worker.ts' : './compute.worker.js', import.meta.url),
);

/** Worker threads for geometry: pass search, facts, the independent check. They never open the database. */
export class ComputePool {
  readonly #piscina = new Piscina({
    filename: workerFile,
    execArgv: isSource
      ? ['--import', new URL('../workers/register-tsx.mjs', import.meta.url).href]
      : [],
    minThreads: 1,
    maxThreads: 2,
    idleTimeout: 60_000,
  });

  run<N extends TaskName>(name: N, input: Input<N>, signal?: AbortSignal): Promise<Output<N>> {
    return this.#piscina.run(input, { name, ...(signal && { signal }) }) as Promise<Output<N>>;
  }

  close(): Promise<void> {
    return this.#piscina.destroy();
  }
}
