/**
 * Element files by the rules of the two-line form and of CCSDS 502.0-B-3 (`fixtures/orbit/SOURCES.md`): every malformed
 * one refused by its code, every valid one accepted whole.
 */
import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { readElementSets } from '../../shared/orbit/element-reader.ts';
import { makeOrbit, propagate } from '../../shared/orbit/propagation.ts';
import { DAY_MS } from '../../shared/time.ts';

interface FileCase {
  id: string;
  format: string;
  reason: string;
  what: string;
  fileName: string;
  base64: string;
}

const casesOf = (name: string): FileCase[] =>
  JSON.parse(
    readFileSync(new URL(`./fixtures/orbit/${name}`, import.meta.url), 'utf8'),
  ) as FileCase[];
const bytesOf = ({ base64 }: FileCase): Uint8Array => Buffer.from(base64, 'base64');

const malformed = casesOf('malformed-element-files.json');

describe('malformed element files', () => {
  it.each(malformed.map((file) => [`${file.id} ${file.what}`, file] as const))(
    'refuses %s',
    (_title, file) => {
      const { accepted, refused } = readElementSets(bytesOf(file), file.fileName);
      // The second of two identical sets is refused, the first used.
      expect(accepted.length).toBeLessThanOrEqual(file.reason === 'DUPLICATE_SET' ? 1 : 0);
      const [fault] = refused;
      expect(fault?.reason.length).toBeGreaterThan(20);
      expect(fault?.line).toBeGreaterThan(0);
      expect(fault?.column).toBeGreaterThan(0);
      expect(fault?.code).toBe(file.reason);
    },
  );
});

describe('valid element files', () => {
  const valid = casesOf('valid-element-files.json');

  it.each(valid.map((file) => [file.fileName, file] as const))('reads %s whole', (_name, file) => {
    const { accepted, refused } = readElementSets(bytesOf(file), file.fileName);
    expect(refused).toEqual([]);
    expect(accepted.map(({ catalogNumber }) => catalogNumber)).toContain(90_001);
  });

  it('gets the same orbit from every form', () => {
    const positions = valid.map((file) => {
      const set = readElementSets(bytesOf(file), file.fileName).accepted.find(
        ({ catalogNumber }) => catalogNumber === 90_001,
      );
      if (!set) throw new Error(`${file.fileName} lacks the set`);
      return propagate(makeOrbit(set), set.epochMs + DAY_MS);
    });
    const [first] = positions;
    if (!first) throw new Error('no position');
    for (const at of positions) {
      if (!at) throw new Error('no position');
      // Epochs of messages are exact to a microsecond, those of two lines to 0.43 ms: 3 m.
      expect(Math.hypot(at.x - first.x, at.y - first.y, at.z - first.z)).toBeLessThan(0.0035);
    }
  });
});
