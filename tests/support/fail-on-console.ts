import { afterEach, beforeEach, expect, vi } from 'vitest';

// A test that makes the product complain on the console has found something: it fails.
const calls: string[] = [];
for (const method of ['error', 'warn'] as const) {
  vi.spyOn(console, method).mockImplementation((...parts: unknown[]) => {
    calls.push(`${method}: ${parts.map(String).join(' ')}`);
  });
}
beforeEach(() => {
  calls.length = 0;
});
afterEach(() => {
  expect(calls).toEqual([]);
});
