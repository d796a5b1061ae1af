import { fileURLToPath } from 'node:url';
import tailwindcss from '@tailwindcss/vite';
import react from '@vitejs/plugin-react';
import { defineConfig } from 'vitest/config';

const empty = fileURLToPath(new URL('./src/lib/empty.ts', import.meta.url));

export default defineConfig({
  plugins: [react(), tailwindcss()],
  resolve: {
    // satellite.js 7 imports WebAssembly builds that only its bulk interface needs; bundling them breaks `vite build`.
    alias: { '#wasm-single-thread': empty, '#wasm-multi-thread': empty },
  },
  publicDir: 'src/public',
  build: { outDir: 'dist/client', emptyOutDir: true, chunkSizeWarningLimit: 700 },
  server: {
    host: '127.0.0.1',
    port: 5173,
    strictPort: true,
    proxy: { '/api': { target: `http://127.0.0.1:${process.env.PORT ?? '3000'}` } },
  },
  test: {
    projects: [
      {
        extends: true,
        test: {
          name: 'unit',
          // One group after the other: browser tests have the machine to themselves.
          sequence: { groupOrder: 0 },
          include: ['{shared,server,src}/**/*.test.{ts,tsx}', 'tests/architecture/**/*.test.ts'],
          setupFiles: ['tests/support/fail-on-console.ts'],
        },
      },
      {
        extends: true,
        test: {
          name: 'accuracy',
          sequence: { groupOrder: 1 },
          include: ['tests/accuracy/**/*.test.ts'],
          testTimeout: 120_000,
          setupFiles: ['tests/support/fail-on-console.ts'],
        },
      },
      {
        extends: true,
        test: {
          name: 'api',
          sequence: { groupOrder: 2 },
          include: ['tests/api/**/*.test.ts'],
          pool: 'forks',
          maxWorkers: 2,
          testTimeout: 30_000,
          hookTimeout: 60_000,
          setupFiles: ['tests/support/fail-on-console.ts'],
        },
      },
      {
        extends: true,
        test: {
          name: 'e2e',
          sequence: { groupOrder: 3 },
          include: ['tests/e2e/**/*.test.ts'],
          fileParallelism: false,
          testTimeout: 180_000,
          hookTimeout: 180_000,
        },
      },
    ],
  },
});
