/** `npm run bench`: every *.bench.mts beside this file, one after the other, each in a process of its own. */
import { spawnSync } from 'node:child_process';
import { readdirSync } from 'node:fs';
import { join } from 'node:path';

const wanted = process.argv[2] ?? '';
const benches = readdirSync(import.meta.dirname)
  .filter((name) => name.endsWith('.bench.mts') && name.includes(wanted))
  .sort();
let failed = 0;
for (const name of benches) {
  console.log(`\n== ${name.replace('.bench.mts', '')}`);
  const { status } = spawnSync('node', ['--import', 'tsx', join(import.meta.dirname, name)], {
    stdio: 'inherit',
  });
  if (status !== 0) failed += 1;
}
process.exit(failed === 0 ? 0 : 1);
