/**
 * `npm test`: format, lint, types, then every test (unit, accuracy, API, browser) and the total as the last line.
 */
import { spawnSync } from 'node:child_process';
import { mkdtempSync, readFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { z } from 'zod';
import { ensureChromium } from './chromium.mts';

const Report = z.object({
  numPassedTests: z.number(),
  numFailedTests: z.number(),
  success: z.boolean(),
});

const run = (command: string, args: string[], env: Record<string, string> = {}): boolean => {
  console.log(`\n> ${command} ${args.join(' ')}`);
  return (
    spawnSync(command, args, { stdio: 'inherit', env: { ...process.env, ...env } }).status === 0
  );
};

let passed = 0;
let failed = 0;
const count = (good: boolean): void => {
  if (good) passed += 1;
  else failed += 1;
};

count(run('npm', ['run', '-s', 'format:check']));
count(run('npm', ['run', '-s', 'lint']));
count(run('npm', ['run', '-s', 'types']));
const chromium = ensureChromium();
count(run('npm', ['run', '-s', 'build']));

const report = join(mkdtempSync(join(tmpdir(), 'skysheaf-tests-')), 'report.json');
const projects = ['unit', 'accuracy', 'api', 'e2e'];
run(
  'npx',
  [
    'vitest',
    'run',
    ...projects.flatMap((project) => ['--project', project]),
    '--reporter=default',
    '--reporter=json',
    `--outputFile.json=${report}`,
  ],
  { CHROMIUM: chromium, NODE_ENV: 'test' },
);
try {
  const result = Report.parse(JSON.parse(readFileSync(report, 'utf8')));
  passed += result.numPassedTests;
  failed += result.numFailedTests;
  // An error outside a test (a suite that cannot be loaded) is a failure, too.
  if (!result.success && result.numFailedTests === 0) failed += 1;
} catch {
  failed += 1;
}
console.log(`\n${passed} passed, ${failed} failed`);
process.exit(failed === 0 ? 0 : 1);
