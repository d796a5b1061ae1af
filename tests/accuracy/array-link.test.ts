/**
 * Array and link quantities against the numbers of `fixtures/link/SOURCES.md`, computed apart from this code; every check
 * names its source and its tolerance. A quantity the product has no use for is not offered; at least 60 must be.
 */
import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { quantity } from './adapter.ts';

interface Check {
  id: string;
  quantity: string;
  inputs: object;
  expected: unknown;
  tolerance: { abs?: number; rel?: number };
  source: string;
}

const checks = JSON.parse(
  readFileSync(new URL('./fixtures/link/array-link.json', import.meta.url), 'utf8'),
) as Check[];
const groupOf = ({ id }: Check): string => id.replace(/^[A-Z]-/, '').replace(/-\d+$/, '');

/** Where two values differ by more than the tolerance, as paths; azimuths compare modulo 360. */
function differences(got: unknown, expected: unknown, { tolerance }: Check, path = ''): string[] {
  if (typeof expected === 'number') {
    if (typeof got !== 'number') return [`${path}: ${String(got)} instead of ${expected}`];
    let apart = Math.abs(got - expected);
    if (/az_deg$/.test(path)) apart = Math.min(apart % 360, 360 - (apart % 360));
    const allowed = (tolerance.abs ?? 0) + (tolerance.rel ?? 0) * Math.abs(expected);
    return apart <= allowed ? [] : [`${path}: ${got} instead of ${expected}`];
  }
  if (typeof expected === 'object' && expected !== null) {
    if (typeof got !== 'object' || got === null) return [`${path}: ${String(got)} instead of more`];
    const has = got as Record<string, unknown>;
    const sizes = Array.isArray(expected) && Array.isArray(got) && got.length !== expected.length;
    const inside = Object.entries(expected).flatMap(([key, value]) =>
      differences(has[key], value, { tolerance } as Check, `${path}.${key}`),
    );
    return sizes ? [`${path}: ${got.length} values`, ...inside] : inside;
  }
  return got === expected ? [] : [`${path}: ${String(got)} instead of ${String(expected)}`];
}

const offered = checks.filter((check) => quantity(groupOf(check), check.inputs) !== undefined);

describe('array and link quantities', () => {
  it('are offered for at least 60 of the 77 groups', () => {
    expect(new Set(checks.map(groupOf)).size).toBe(77);
    expect(new Set(offered.map(groupOf)).size).toBeGreaterThanOrEqual(60);
  });

  it.each(offered.map((check) => [`${check.id} ${check.quantity}`, check] as const))(
    '%s',
    (_, check) => {
      const got = quantity(groupOf(check), check.inputs);
      expect(differences(got, check.expected, check), check.source).toEqual([]);
    },
  );
});
