/** `npm run dev`: Vite with its /api proxy, and the server that restarts when its sources change. */
import { spawn } from 'node:child_process';

const children = [
  spawn('node', ['--import', 'tsx', '--watch', 'server/index.ts'], { stdio: 'inherit' }),
  spawn('npx', ['vite'], { stdio: 'inherit' }),
];
const stop = (): void => {
  for (const child of children) child.kill('SIGTERM');
};
process.once('SIGINT', stop);
process.once('SIGTERM', stop);
for (const child of children) child.once('exit', stop);
