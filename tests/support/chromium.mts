import { spawnSync } from 'node:child_process';
import { existsSync } from 'node:fs';

const PLACES = [
  process.env.CHROMIUM,
  '/usr/bin/chromium',
  '/usr/bin/chromium-browser',
  '/usr/bin/google-chrome',
];

export const findChromium = (): string | null =>
  PLACES.find((path): path is string => path !== undefined && existsSync(path)) ?? null;

const apt = (...args: string[]): boolean =>
  spawnSync('apt-get', args, {
    stdio: 'inherit',
    env: { ...process.env, DEBIAN_FRONTEND: 'noninteractive' },
  }).status === 0;

/** The browser of the tests: the one that is there, else Debian's, installed where this process may. */
export const ensureChromium = (): string => {
  const found = findChromium();
  if (found) return found;
  const mayInstall = process.getuid?.() === 0 && existsSync('/usr/bin/apt-get');
  if (mayInstall) {
    console.log('No Chromium found: installing Debian’s.');
    if (apt('update') && apt('install', '-y', '--no-install-recommends', 'chromium')) {
      const installed = findChromium();
      if (installed) return installed;
    }
  }
  console.error(
    'The browser tests need Chromium. Install it (on Debian: apt-get install chromium) or set CHROMIUM to its path.',
  );
  process.exit(1);
};
