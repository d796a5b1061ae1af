import { spawn, type ChildProcess } from 'node:child_process';
import { existsSync, mkdtempSync, rmSync } from 'node:fs';
import { createServer, type AddressInfo } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';

export interface RunningServer {
  url: string;
  stop(): Promise<void>;
}

const freePort = (): Promise<number> =>
  new Promise((resolve) => {
    const server = createServer().listen(0, '127.0.0.1', () => {
      const { port } = server.address() as AddressInfo;
      server.close(() => resolve(port));
    });
  });

/** Longest time for seeding the demo on a busy machine. */
const START_MS = 170_000;

const waitUntilUp = async (url: string, child: ChildProcess, output: () => string) => {
  const began = Date.now();
  for (;;) {
    const answer = await fetch(`${url}/api/health`).catch(() => null);
    if (answer?.ok) return;
    if (child.exitCode !== null || Date.now() - began > START_MS)
      throw new Error(`The server did not start: ${output()}`);
    await new Promise((done) => setTimeout(done, 200));
  }
};

/** The built product on a demo database of its own, its clock beginning at an instant. */
export const startServer = async (clockStart: string): Promise<RunningServer> => {
  if (!existsSync('dist/server/index.js')) throw new Error('Build first: npm run build');
  const folder = mkdtempSync(join(tmpdir(), 'skysheaf-e2e-'));
  const port = await freePort();
  const child = spawn('node', ['--enable-source-maps', 'dist/server/index.js'], {
    env: {
      ...process.env,
      NODE_ENV: 'production',
      PORT: String(port),
      DATABASE_FILE: join(folder, 'db.sqlite'),
      CLOCK_START: clockStart,
      LOG_LEVEL: 'warn',
    },
  });
  let text = '';
  for (const stream of [child.stdout, child.stderr])
    stream.on('data', (chunk: Buffer) => {
      text += chunk.toString();
    });
  const url = `http://127.0.0.1:${port}`;
  await waitUntilUp(url, child, () => text);
  return {
    url,
    stop: async () => {
      child.kill('SIGTERM');
      await new Promise((done) => child.once('exit', done));
      rmSync(folder, { recursive: true, force: true });
    },
  };
};
