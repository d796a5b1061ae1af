import { spawn, type ChildProcess } from 'node:child_process';
import { mkdtempSync, rmSync } from 'node:fs';
import { createServer, type AddressInfo } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, describe, expect, it } from 'vitest';

const folders: string[] = [];
const children: ChildProcess[] = [];
afterEach(() => {
  for (const child of children.splice(0)) child.kill('SIGKILL');
  for (const folder of folders.splice(0)) rmSync(folder, { recursive: true, force: true });
});

const newFile = (): string => {
  const folder = mkdtempSync(join(tmpdir(), 'skysheaf-process-'));
  folders.push(folder);
  return join(folder, 'db.sqlite');
};

const freePort = (): Promise<number> =>
  new Promise((resolve) => {
    const server = createServer().listen(0, '127.0.0.1', () => {
      const { port } = server.address() as AddressInfo;
      server.close(() => resolve(port));
    });
  });

interface Running {
  child: ChildProcess;
  output: () => string;
  exit: Promise<number | null>;
}

const run = (script: string, env: Record<string, string>, args: string[] = []): Running => {
  const { PATH = '', HOME = '' } = process.env;
  const child = spawn('node', ['--import', 'tsx', script, ...args], {
    env: { PATH, HOME, SEED_DEMO: 'no', ...env },
  });
  children.push(child);
  let text = '';
  for (const stream of [child.stdout, child.stderr])
    stream.on('data', (chunk: Buffer) => {
      text += chunk.toString();
    });
  return {
    child,
    output: () => text,
    exit: new Promise((resolve) => child.once('exit', resolve)),
  };
};

const startServer = async (file: string, env: Record<string, string> = {}) => {
  const port = await freePort();
  const running = run('server/index.ts', { DATABASE_FILE: file, PORT: String(port), ...env });
  const base = `http://127.0.0.1:${port}`;
  for (let i = 0; i < 200; i++) {
    if (running.child.exitCode !== null) break;
    const answer = await fetch(`${base}/api/health`).catch(() => null);
    if (answer?.ok) break;
    await new Promise((done) => setTimeout(done, 100));
  }
  return { ...running, base };
};

describe('the process', () => {
  it('serves, refuses a second process on its database, and stops cleanly', async () => {
    const file = newFile();
    const first = await startServer(file);
    expect((await fetch(`${first.base}/api/health`)).status).toBe(200);
    const second = run('server/index.ts', { DATABASE_FILE: file, PORT: String(await freePort()) });
    expect(await second.exit).toBe(1);
    expect(second.output()).toMatch(/in use by another process/);
    first.child.kill('SIGTERM');
    expect(await first.exit).toBe(0);
    expect(first.output()).toContain('stopped');
    // The lock is gone with the process, also after a kill.
    const third = await startServer(file);
    third.child.kill('SIGKILL');
    await third.exit;
    const fourth = await startServer(file);
    expect((await fetch(`${fourth.base}/api/health`)).status).toBe(200);
  });

  it('says what is wrong in the environment, a line each', async () => {
    const wrong = run('server/index.ts', {
      PORT: 'many',
      APP_SECRET: 'short',
      SMTP_URL: 'nowhere',
    });
    expect(await wrong.exit).toBe(1);
    for (const name of ['PORT', 'APP_SECRET', 'SMTP_URL']) expect(wrong.output()).toContain(name);
    expect(wrong.output()).not.toContain('    at ');
  });

  it('refuses the demo’s secret and clock in production on a database that is not the demo', async () => {
    const file = newFile();
    const seed = run(
      'server/seeders/run.ts',
      { DATABASE_FILE: file, ADMIN_PASSWORD: 'a first password' },
      ['administrator', 'First Person', 'first@test.example'],
    );
    expect(await seed.exit).toBe(0);
    const bare = run('server/index.ts', { DATABASE_FILE: file, NODE_ENV: 'production' });
    expect(await bare.exit).toBe(1);
    expect(bare.output()).toMatch(/set APP_SECRET/);
    const secret = 'a secret of one’s own that is long enough';
    const late = run('server/index.ts', {
      DATABASE_FILE: file,
      NODE_ENV: 'production',
      APP_SECRET: secret,
      CLOCK_START: '2026-12-01T23:50:00.000Z',
    });
    expect(await late.exit).toBe(1);
    expect(late.output()).toMatch(/CLOCK_START/);
    const good = await startServer(file, { NODE_ENV: 'production', APP_SECRET: secret });
    const answer = await fetch(`${good.base}/api/session`, {
      method: 'POST',
      headers: { 'content-type': 'application/json' },
      body: JSON.stringify({ email: 'first@test.example', password: 'a first password' }),
    });
    expect(answer.status).toBe(201);
  });
});
