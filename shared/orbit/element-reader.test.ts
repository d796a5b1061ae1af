import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { twoLines } from '../../tests/support/orbit/two-lines.ts';
import { LARGEST_FILE_BYTES, readElementSets } from './element-reader.ts';
import type { ElementSetReading } from './element-set.ts';
import { checksum } from './element-files/tle-columns.ts';

const read = (text: string, fileName = 'sets.tle'): ElementSetReading =>
  readElementSets(new TextEncoder().encode(text), fileName);

const { line1, line2 } = twoLines({ catalogNumber: 95101 });
const PAIR = `${line1}\n${line2}\n`;

/** Text written over columns from a 1-based one, with a fresh checksum. */
const withText = (line: string, column: number, text: string): string => {
  const changed = line.slice(0, column - 1) + text + line.slice(column - 1 + text.length);
  return changed.slice(0, 68) + String(checksum(changed));
};
const first = (column: number, text: string): string =>
  `${withText(line1, column, text)}\n${line2}`;
const second = (column: number, text: string): string =>
  `${line1}\n${withText(line2, column, text)}`;

describe('reading two-line files', () => {
  it('reads pairs with and without names, with any line ends, in any mix', () => {
    const other = twoLines({ catalogNumber: 95102 });
    const text = `\uFEFFALPHA ONE\r\n${line1}  \r\n${line2}\r\n\r\n${other.line1}\r${other.line2}`;
    const { accepted, refused, unreadable } = read(text);
    expect(refused).toEqual([]);
    expect(unreadable).toBe(false);
    expect(accepted.map(({ name, line, catalogNumber }) => [name, line, catalogNumber])).toEqual([
      ['ALPHA ONE', 2, 95101],
      [null, 5, 95102],
    ]);
  });

  it('takes the leading 0 of a name line off', () => {
    expect(read(`0 ALPHA ONE\n${PAIR}`).accepted[0]?.name).toBe('ALPHA ONE');
  });

  it('tells a name that begins like a first line from one', () => {
    expect(read(`1 OF MANY\n${PAIR}`).accepted[0]?.name).toBe('1 OF MANY');
  });

  it('gives the elements in the units of the form', () => {
    // Day 335.25 of 2026 is 1 December, 06:00; " 56789-4" is 0.56789e-4.
    const lines = twoLines({
      epochDay: 335.25,
      bstar: '-56789-4',
      inclinationDeg: 97.4321,
      raanDeg: 123.4567,
      eccentricity: 0.0012345,
      argumentOfPerigeeDeg: 87.6543,
      meanAnomalyDeg: 272.5678,
      meanMotionRevPerDay: 15.12345678,
    });
    expect(read(`${lines.line1}\n${lines.line2}`).accepted[0]).toMatchObject({
      epochMs: Date.UTC(2026, 11, 1, 6),
      bstar: -0.000056789,
      inclinationDeg: 97.4321,
      raanDeg: 123.4567,
      eccentricity: 0.0012345,
      argumentOfPerigeeDeg: 87.6543,
      meanAnomalyDeg: 272.5678,
      meanMotionRevPerDay: 15.12345678,
    });
  });

  // Alpha-5: A = 10 ... H = 17, J = 18 ... N = 22, P = 23 ... Z = 33.
  it.each([
    ['A0001', 100_001],
    ['H9999', 179_999],
    ['J0000', 180_000],
    ['N0000', 220_000],
    ['P0000', 230_000],
    ['Z9999', 339_999],
    ['00005', 5],
    ['    5', 5],
  ])('decodes the catalogue number %s', (text, number) => {
    const lines = `${withText(line1, 3, text)}\n${withText(line2, 3, text)}`;
    expect(read(lines).accepted[0]?.catalogNumber).toBe(number);
  });

  it('reads the years 1957 to 2056', () => {
    const yearOf = (text: string): number =>
      new Date(read(first(19, text)).accepted[0]?.epochMs ?? NaN).getUTCFullYear();
    expect([yearOf('57'), yearOf('99'), yearOf('00'), yearOf('56')]).toEqual([
      1957, 1999, 2000, 2056,
    ]);
  });
});

describe('refusing single sets', () => {
  const refusals: [what: string, text: string, code: string, line: number, column: number][] = [
    ['a checksum column cut off', `${line1.slice(0, 68)}\n${line2}`, 'TLE_LENGTH', 1, 69],
    ['text after column 69', `${line1}\n${line2} extra`, 'TLE_LENGTH', 2, 70],
    ['a cut second line', `${line1}\n${line2.slice(0, 50)}`, 'TLE_LENGTH', 2, 51],
    ['a changed digit', `${line1}\n${line2.replace('97.5', '98.5')}`, 'TLE_CHECKSUM', 2, 69],
    ['a letter as checksum', `${line1.slice(0, 68)}U\n${line2}`, 'TLE_CHECKSUM', 1, 69],
    ['lines of two objects', second(3, '95102'), 'TLE_CATALOG_MISMATCH', 2, 3],
    ['Alpha-5 with I', first(3, 'I0001'), 'TLE_ALPHA5_LETTER', 1, 3],
    ['a small letter', first(3, 'a0001'), 'TLE_CATALOG', 1, 3],
    ['a tab', first(9, '\t'), 'TLE_CHARACTERS', 1, 9],
    ['a minus that is none', first(54, '\u2212'), 'TLE_CHARACTERS', 1, 54],
    [
      'shifted data',
      `1  95101${line1.slice(7, 16)} ${line1.slice(18)}\n${line2}`,
      'TLE_COLUMNS',
      1,
      9,
    ],
    ['day 366 of 2026', first(21, '366'), 'EPOCH_RANGE', 1, 21],
    ['day 0', first(21, '000'), 'EPOCH_RANGE', 1, 21],
    ['the letter O', second(9, ' 97.5OOO'), 'TLE_NUMBER', 2, 9],
    ['a decimal comma', second(9, ' 97,5000'), 'TLE_NUMBER', 2, 9],
    ['a point in the eccentricity', second(27, '.001234'), 'TLE_NUMBER', 2, 27],
    ['a mean motion with a letter', second(53, '1X.12345678'), 'TLE_NUMBER', 2, 53],
    ['B* in E notation', first(54, '5.67E-5 '), 'TLE_EXPONENT', 1, 54],
    ['inclination 197', second(9, '197.5000'), 'RANGE_INCLINATION', 2, 9],
    ['node 423', second(18, '423.4567'), 'RANGE_RA_OF_ASC_NODE', 2, 18],
    ['argument of perigee 360', second(35, '360.0000'), 'RANGE_ARG_OF_PERICENTER', 2, 35],
    ['mean anomaly 400', second(44, '400.0000'), 'RANGE_MEAN_ANOMALY', 2, 44],
    ['mean motion 0', second(53, ' 0.00000000'), 'RANGE_MEAN_MOTION', 2, 53],
    ['mean motion 18.5', second(53, '18.50000000'), 'RANGE_MEAN_MOTION', 2, 53],
    ['a perigee under the ground', second(27, '9000000'), 'RANGE_PERIGEE', 2, 27],
    ['another orbit model', first(63, '4'), 'EPHEMERIS_TYPE', 1, 63],
    ['a tag as name', `<pre>\n${PAIR}`, 'TLE_NAME', 1, 1],
    ['a long name', `${'N'.repeat(25)}\n${PAIR}`, 'TLE_NAME', 1, 1],
    ['a tab in a name', `TAB\tNAME\n${PAIR}`, 'TLE_CHARACTERS', 1, 4],
  ];

  it.each(refusals)('refuses %s', (_what, text, code, line, column) => {
    const { accepted, refused, unreadable } = read(text);
    expect(accepted).toEqual([]);
    expect(unreadable).toBe(false);
    expect(refused).toMatchObject([{ code, line, column }]);
    expect(refused[0]?.reason).toMatch(/^[A-Z].{20,}[^.]\.$/);
  });

  it('keeps the good sets of a file with bad ones', () => {
    const bad = twoLines({ catalogNumber: 95102, inclinationDeg: 190 });
    const { accepted, refused } = read(`${bad.line1}\n${bad.line2}\n${PAIR}`);
    expect(accepted.map(({ catalogNumber }) => catalogNumber)).toEqual([95101]);
    expect(refused).toMatchObject([{ code: 'RANGE_INCLINATION', line: 2 }]);
  });

  it('uses the first of identical sets and refuses the second', () => {
    const { accepted, refused } = read(PAIR + PAIR);
    expect(accepted).toHaveLength(1);
    expect(refused).toMatchObject([{ code: 'DUPLICATE_SET', line: 3 }]);
  });

  it('refuses another orbit of the same object and epoch, but takes another epoch', () => {
    const other = twoLines({ inclinationDeg: 50 });
    expect(read(`${PAIR}${other.line1}\n${other.line2}`).refused).toMatchObject([
      { code: 'DUPLICATE_SET', line: 3 },
    ]);
    const later = twoLines({ epochDay: 336 });
    expect(read(`${PAIR}${later.line1}\n${later.line2}`).accepted).toHaveLength(2);
  });
});

describe('refusing whole files', () => {
  const files: [what: string, text: string, code: string, line: number][] = [
    ['nothing but blanks', ' \r\n\n', 'FILE_EMPTY', 1],
    ['a first line alone', line1, 'TLE_STRUCTURE', 1],
    ['two first lines', `${line1}\n${line1}\n${line2}`, 'TLE_STRUCTURE', 1],
    ['two names', `ONE\nTWO\n${PAIR}`, 'TLE_STRUCTURE', 1],
    ['a name at the end', `${PAIR}LATE`, 'TLE_STRUCTURE', 3],
    ['the second line first', `${line2}\n${line1}`, 'TLE_LINE_NUMBER', 1],
    ['a web page', `<!DOCTYPE html>\n<html>\n<body>Not found</body>`, 'TLE_NAME', 1],
    ['prose', `The element sets of this week follow below.\nSincerely`, 'TLE_NAME', 1],
  ];

  it.each(files)('refuses %s', (_what, text, code, line) => {
    const { accepted, refused, unreadable } = read(text);
    expect([accepted, unreadable]).toEqual([[], true]);
    expect(refused[0]).toMatchObject({ code, line });
  });

  it('accepts nothing of a file whose structure is broken, however good its sets', () => {
    const { accepted, unreadable } = read(`${PAIR}${line1}`);
    expect([accepted, unreadable]).toEqual([[], true]);
  });

  it('refuses bytes that are no text, with their place', () => {
    const bytes = (values: number[]): ElementSetReading =>
      readElementSets(Uint8Array.from(values), 'x.tle');
    expect(bytes([])).toMatchObject({ unreadable: true, refused: [{ code: 'FILE_EMPTY' }] });
    expect(bytes([65, 10, 66, 0]).refused).toMatchObject([
      { code: 'FILE_BINARY', line: 2, column: 2 },
    ]);
    expect(bytes([65, 10, 66, 67, 0xe9, 66]).refused).toMatchObject([
      { code: 'FILE_ENCODING', line: 2, column: 3 },
    ]);
    const large = readElementSets(new Uint8Array(LARGEST_FILE_BYTES + 1).fill(32), 'x.tle');
    expect(large.refused).toMatchObject([{ code: 'FILE_TOO_LARGE' }]);
  });

  it('reads a large file quickly enough to be linear', () => {
    const many = Array.from({ length: 3000 }, (_, index) =>
      twoLines({ catalogNumber: 90_000 + index }),
    );
    const { accepted, refused } = read(many.map((set) => `${set.line1}\n${set.line2}`).join('\n'));
    expect([accepted.length, refused.length]).toEqual([3000, 0]);
  });
});

describe('any input', () => {
  it('never throws and never accepts a set with an invalid checksum', () => {
    fc.assert(
      fc.property(
        fc.nat(137),
        fc.string({ minLength: 1, maxLength: 3 }),
        fc.boolean(),
        (place, text, replaces) => {
          const changed =
            PAIR.slice(0, place) + text + PAIR.slice(place + (replaces ? text.length : 0));
          for (const set of read(changed).accepted) {
            expect(checksum(set.line1)).toBe(Number(set.line1.at(-1)));
            expect(checksum(set.line2)).toBe(Number(set.line2.at(-1)));
          }
        },
      ),
    );
  });

  it('never throws on bytes', () => {
    fc.assert(
      fc.property(fc.uint8Array({ maxLength: 200 }), (bytes) => {
        expect(readElementSets(bytes, 'any').accepted).toEqual([]);
      }),
    );
  });
});
