import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { readElementSets } from '../element-reader.ts';
import type { ElementSetReading } from '../element-set.ts';
import { OMM_KEYWORDS } from './omm-record.ts';
import { exponentText, exponentValue } from './tle-columns.ts';
import { twoLineForm } from './two-line-form.ts';

const read = (text: string, fileName: string): ElementSetReading =>
  readElementSets(new TextEncoder().encode(text), fileName);

/** An invented set by its OMM keywords, in the order of the standard. */
const SET: Readonly<Record<string, string | number>> = {
  OBJECT_NAME: 'ALPHA ONE',
  OBJECT_ID: '2026-901A',
  EPOCH: '2026-12-01T06:00:00.123456',
  MEAN_MOTION: 15.1,
  ECCENTRICITY: 0.0012,
  INCLINATION: 97.5,
  RA_OF_ASC_NODE: 40.25,
  ARG_OF_PERICENTER: 30.5,
  MEAN_ANOMALY: 10.75,
  EPHEMERIS_TYPE: 0,
  CLASSIFICATION_TYPE: 'U',
  NORAD_CAT_ID: 795123456,
  ELEMENT_SET_NO: 1,
  REV_AT_EPOCH: 12,
  BSTAR: 0.000056789,
  MEAN_MOTION_DOT: 0,
  MEAN_MOTION_DDOT: 0,
};
const MESSAGE: Readonly<Record<string, string | number>> = {
  CREATION_DATE: '2026-12-01T00:00:00',
  ORIGINATOR: 'EXAMPLE',
  OBJECT_NAME: 'ALPHA ONE',
  OBJECT_ID: '2026-901A',
  CENTER_NAME: 'EARTH',
  REF_FRAME: 'TEME',
  TIME_SYSTEM: 'UTC',
  MEAN_ELEMENT_THEORY: 'SGP4',
  ...SET,
};

type Change = Record<string, unknown>;
const json = (change: Change = {}): string => JSON.stringify([{ ...SET, ...change }]);
const csv = (change: Change = {}): string => {
  const set = { ...SET, ...change };
  return `${Object.keys(set).join(',')}\n${Object.values(set).map(String).join(',')}\n`;
};
const kvn = (change: Change = {}): string =>
  [
    'CCSDS_OMM_VERS = 3.0',
    ...Object.entries({ ...MESSAGE, ...change }).map(([k, v]) => `${k} = ${String(v)}`),
  ].join('\n');
const xml = (change: Change = {}, omm = 'id="CCSDS_OMM_VERS" version="3.0"'): string => {
  const all: Record<string, unknown> = { ...MESSAGE, ...change };
  const block = (name: keyof typeof OMM_KEYWORDS): string => {
    const inside = OMM_KEYWORDS[name].filter((keyword) => all[keyword] !== undefined);
    return `<${name}>${inside.map((k) => `<${k}>${String(all[k])}</${k}>`).join('')}</${name}>`;
  };
  const data = `<data>${block('meanElements')}${block('tleParameters')}</data>`;
  return `<omm ${omm}>\n${block('header')}<body><segment>${block('metadata')}${data}</segment></body></omm>`;
};

const FORMS = [
  ['omm-json', 'sets.json', json()],
  ['omm-csv', 'sets.csv', csv()],
  ['omm-kvn', 'set.omm', kvn()],
  ['omm-xml', 'set.xml', xml()],
] as const;

describe('reading mean-elements messages', () => {
  it.each(FORMS)('reads %s', (format, fileName, text) => {
    const reading = read(text, fileName);
    expect(reading).toMatchObject({ format, refused: [], unreadable: false });
    expect(reading.accepted).toMatchObject([
      {
        name: 'ALPHA ONE',
        catalogNumber: 795_123_456,
        epochMs: Date.UTC(2026, 11, 1, 6) + 123.456,
        meanMotionRevPerDay: 15.1,
        eccentricity: 0.0012,
        inclinationDeg: 97.5,
        raanDeg: 40.25,
        argumentOfPerigeeDeg: 30.5,
        meanAnomalyDeg: 10.75,
        bstar: 0.000056789,
      },
    ]);
  });

  it.each(FORMS)('knows %s by its content, whatever its name', (format, _fileName, text) => {
    expect(read(text, 'upload').format).toBe(format);
  });

  it('reads day-of-year epochs, numbers as texts and several sets', () => {
    const two = JSON.stringify([
      { ...SET, EPOCH: '2026-335T06:00:00Z', MEAN_MOTION: '15.1' },
      { ...SET, NORAD_CAT_ID: '95002' },
    ]);
    const { accepted } = read(two, 'two.json');
    expect(accepted.map(({ catalogNumber }) => catalogNumber)).toEqual([795_123_456, 95_002]);
    expect(accepted[0]?.epochMs).toBe(Date.UTC(2026, 11, 1, 6));
    expect(read(`${kvn()}\n${kvn({ NORAD_CAT_ID: 95_003 })}`, 'two.kvn').accepted).toHaveLength(2);
    const both = `<ndm>${xml()}${xml({ NORAD_CAT_ID: 95_003 })}</ndm>`;
    expect(read(both, 'two.xml').accepted).toHaveLength(2);
  });

  it('takes units that agree and passes over blocks that say nothing on the orbit', () => {
    const text = kvn({ MEAN_MOTION: '15.1 [rev/day]' });
    const more = `${text}\nCOMMENT done\nMASS = 12 [kg]\nUSER_DEFINED_COLOUR = red`;
    expect(read(more, 'set.kvn').refused).toEqual([]);
  });

  it('keeps the good sets of a file with bad ones', () => {
    const mixed = JSON.stringify([
      { ...SET, INCLINATION: 181 },
      { ...SET, NORAD_CAT_ID: 7 },
    ]);
    const { accepted, refused } = read(mixed, 'mixed.json');
    expect(accepted.map(({ catalogNumber }) => catalogNumber)).toEqual([7]);
    expect(refused).toMatchObject([{ code: 'RANGE_INCLINATION', line: 1 }]);
  });
});

describe('refusing mean-elements messages', () => {
  const values: [code: string, change: Change][] = [
    ['OMM_MISSING', { EPOCH: undefined }],
    ['OMM_MISSING', { BSTAR: null }],
    ['OMM_MISSING', { MEAN_MOTION: '' }],
    ['EPOCH_FORMAT', { EPOCH: '2026-12-01T06:00:00+02:00' }],
    ['EPOCH_FORMAT', { EPOCH: '2026-12-01 06:00:00' }],
    ['EPOCH_FORMAT', { EPOCH: 1_777_805_866 }],
    ['EPOCH_RANGE', { EPOCH: '2026-02-30T00:00:00' }],
    ['EPOCH_RANGE', { EPOCH: '2026-13-01T00:00:00' }],
    ['EPOCH_RANGE', { EPOCH: '2026-00-01T00:00:00' }],
    ['EPOCH_RANGE', { EPOCH: '2026-366T00:00:00' }],
    ['EPOCH_RANGE', { EPOCH: '2026-12-31T23:59:60' }],
    ['OMM_TIME_SYSTEM', { TIME_SYSTEM: 'TAI' }],
    ['OMM_REF_FRAME', { REF_FRAME: 'EME2000' }],
    ['OMM_CENTER', { CENTER_NAME: 'MARS' }],
    ['OMM_THEORY', { MEAN_ELEMENT_THEORY: 'SGP4-XP' }],
    ['EPHEMERIS_TYPE', { EPHEMERIS_TYPE: 4 }],
    ['OMM_SEMI_MAJOR_AXIS', { SEMI_MAJOR_AXIS: 6900 }],
    ['OMM_NUMBER', { INCLINATION: '97,43' }],
    ['OMM_NUMBER', { MEAN_MOTION: '15.1 rev/day' }],
    ['OMM_NUMBER', { ECCENTRICITY: true }],
    ['OMM_NUMBER', { ECCENTRICITY: [0.001] }],
    ['RANGE_ECCENTRICITY', { ECCENTRICITY: 12_345 }],
    ['RANGE_BSTAR', { BSTAR: 56_789 }],
    ['RANGE_PERIGEE', { ECCENTRICITY: 0.3 }],
    ['OMM_CATALOG', { NORAD_CAT_ID: 'A0001' }],
    ['OMM_CATALOG', { NORAD_CAT_ID: 1_234_567_890 }],
    ['OMM_NAME', { OBJECT_NAME: 'ALPHA\nONE' }],
    ['OMM_OBJECT_ID', { OBJECT_ID: '26901A' }],
  ];

  it.each(values)('refuses %s in %j', (code, change) => {
    const { accepted, refused, unreadable } = read(json(change), 'set.json');
    expect([accepted, unreadable]).toEqual([[], false]);
    expect(refused).toMatchObject([{ code, line: 1 }]);
    expect(refused[0]?.reason).toMatch(/^[A-Z].{20,}[^.]\.$/s);
  });

  const forms: [what: string, fileName: string, text: string, code: string][] = [
    ['JSON cut off', 'x.json', json().slice(0, -20), 'JSON_SYNTAX'],
    ['JSON with NaN', 'x.json', json().replace('15.1', 'NaN'), 'JSON_SYNTAX'],
    ['JSON with a last comma', 'x.json', '[{"EPOCH": 1},]', 'JSON_SYNTAX'],
    ['an open text', 'x.json', '[{"EPOCH', 'JSON_SYNTAX'],
    ['an empty list', 'x.json', '[]', 'FILE_EMPTY'],
    [
      'a repeated key',
      'x.json',
      json().replace('"EPOCH"', '"BSTAR":0,"EPOCH"'),
      'OMM_DUPLICATE_KEY',
    ],
    ['CSV without header', 'x.csv', csv().split('\n')[1] ?? '', 'CSV_HEADER'],
    ['semicolons', 'x.csv', csv().replaceAll(',', ';'), 'CSV_HEADER'],
    ['a missing column', 'x.csv', csv().replace('BSTAR', 'DRAG'), 'CSV_HEADER'],
    ['a repeated column', 'x.csv', csv().replace('REV_AT_EPOCH', 'EPOCH'), 'CSV_HEADER'],
    ['an open quote', 'x.csv', csv().replace('ALPHA', '"ALPHA'), 'CSV_QUOTE'],
    ['a header alone', 'x.csv', csv().split('\n')[0] ?? '', 'FILE_EMPTY'],
    ['another first line', 'x.omm', `OBJECT_NAME = X\n${kvn()}`, 'KVN_FIRST_LINE'],
    ['version 1.0', 'x.omm', kvn().replace('3.0', '1.0'), 'OMM_VERSION'],
    ['a keyword in small letters', 'x.omm', kvn().replace('BSTAR', 'bstar'), 'KVN_KEYWORD'],
    ['another order', 'x.omm', `${kvn()}\nGM = 398600.8`, 'KVN_ORDER'],
    ['a line without equals', 'x.omm', kvn().replace('BSTAR =', 'BSTAR'), 'KVN_SYNTAX'],
    ['rad', 'x.omm', kvn({ INCLINATION: '1.7 [rad]' }), 'OMM_UNITS'],
    ['a tab', 'x.omm', kvn().replace('BSTAR =', 'BSTAR\t='), 'KVN_CHARACTERS'],
    ['a long line', 'x.omm', kvn({ ORIGINATOR: 'X'.repeat(260) }), 'KVN_LINE_LENGTH'],
    [
      'a keyword twice',
      'x.omm',
      kvn().replace('REV_AT_EPOCH = 12', 'BSTAR = 0'),
      'OMM_DUPLICATE_KEY',
    ],
    ['an open element', 'x.xml', xml().replace('</segment>', ''), 'XML_SYNTAX'],
    ['an unknown entity', 'x.xml', xml({ OBJECT_NAME: 'A&nbsp;B' }), 'XML_SYNTAX'],
    ['a document type', 'x.xml', `<!DOCTYPE omm [<!ENTITY a "b">]>${xml()}`, 'XML_DOCTYPE'],
    ['another root', 'x.xml', '<?xml version="1.0"?><opm/>', 'XML_ROOT'],
    ['version 4.0', 'x.xml', xml({}, 'id="CCSDS_OMM_VERS" version="4.0"'), 'OMM_VERSION'],
    ['another id', 'x.xml', xml({}, 'id="CCSDS_OPM_VERS" version="3.0"'), 'XML_ID'],
    ['an unknown element', 'x.xml', xml().replaceAll('REV_AT_EPOCH', 'REVOLUTION'), 'XML_ELEMENT'],
    [
      'a strange namespace',
      'x.xml',
      xml({}, 'xmlns="urn:example:x" id="CCSDS_OMM_VERS" version="3.0"'),
      'XML_NAMESPACE',
    ],
    ['an undeclared prefix', 'x.xml', xml().replace('<data>', '<ndm:data>'), 'XML_NAMESPACE'],
    [
      'units of another kind',
      'x.xml',
      xml().replace('<INCLINATION>', '<INCLINATION units="rad">'),
      'OMM_UNITS',
    ],
  ];

  it.each(forms)('refuses %s as a whole', (_what, fileName, text, code) => {
    const { accepted, refused, unreadable } = read(text, fileName);
    expect(refused).toMatchObject([{ code }]);
    expect([accepted, unreadable]).toEqual([[], true]);
  });

  it.each([
    ['a short row', csv().replace(',12,', ','), 'x.csv', 'CSV_COLUMNS'],
    ['an empty cell', csv({ OBJECT_ID: '' }), 'x.csv', 'OMM_MISSING'],
    ['a list of texts', '["1 95101U"]', 'x.json', 'OMM_NOT_OBJECT'],
    ['an empty value', kvn({ TIME_SYSTEM: '' }), 'x.omm', 'OMM_MISSING'],
    ['an empty element', xml({ EPOCH: '' }), 'x.xml', 'OMM_MISSING'],
  ])('refuses %s as a single set', (_what, text, fileName, code) => {
    expect(read(text, fileName)).toMatchObject({ unreadable: false, refused: [{ code }] });
  });

  it('tells line and column of the value', () => {
    const lines = kvn({ ECCENTRICITY: 'x' }).split('\n');
    const line = lines.findIndex((text) => text.startsWith('ECC')) + 1;
    expect(read(lines.join('\n'), 'x.kvn').refused).toMatchObject([{ line, column: 16 }]);
    const pretty = JSON.stringify([{ ...SET, ECCENTRICITY: 'x' }], null, 2);
    expect(read(pretty, 'x.json').refused).toMatchObject([{ line: 7, column: 21 }]);
  });

  it('never throws, whatever is done to a file', () => {
    fc.assert(
      fc.property(
        fc.constantFrom(...FORMS),
        fc.nat(400),
        fc.string({ maxLength: 4 }),
        fc.nat(6),
        ([, fileName, text], place, insert, removed) => {
          const changed = text.slice(0, place) + insert + text.slice(place + removed);
          for (const fault of read(changed, fileName).refused)
            expect(fault.line).toBeGreaterThan(0);
        },
      ),
      { numRuns: 500 },
    );
  });
});

describe('the two-line form of a message', () => {
  it('is read back as the same elements', () => {
    fc.assert(
      fc.property(
        fc.record({
          catalogNumber: fc.integer({ min: 1, max: 339_999 }),
          objectId: fc.constantFrom('2026-901A', '1998-067ABC', 'UNKNOWN'),
          epochMs: fc.integer({ min: Date.UTC(1990, 0, 1), max: Date.UTC(2050, 0, 1) }),
          meanMotionRevPerDay: fc.double({ min: 0.1, max: 15.5, noNaN: true }),
          eccentricity: fc.double({ min: 0, max: 0.02, noNaN: true }),
          inclinationDeg: fc.double({ min: 0, max: 180, noNaN: true }),
          raanDeg: fc.double({ min: -180, max: 359.99, noNaN: true }),
          argumentOfPerigeeDeg: fc.double({ min: 0, max: 359.99999, noNaN: true }),
          meanAnomalyDeg: fc.double({ min: 0, max: 359.99, noNaN: true }),
          bstar: fc.double({ min: -0.5, max: 0.5, noNaN: true }),
        }),
        (set) => {
          const { line1, line2 } = twoLineForm(set);
          const { accepted, refused } = read(`${line1}\n${line2}`, 'x.tle');
          expect(refused).toEqual([]);
          const [got] = accepted;
          if (!got) throw new Error('nothing was read');
          expect(got.catalogNumber).toBe(set.catalogNumber);
          expect(Math.abs(got.epochMs - set.epochMs)).toBeLessThan(0.44);
          expect(got.meanMotionRevPerDay).toBeCloseTo(set.meanMotionRevPerDay, 7);
          expect(got.eccentricity).toBeCloseTo(set.eccentricity, 6);
          expect(Math.abs(((got.raanDeg - set.raanDeg + 540) % 360) - 180)).toBeLessThan(6e-5);
          expect(Math.abs(got.bstar - set.bstar)).toBeLessThanOrEqual(
            5.1e-5 * Math.abs(set.bstar) + 1e-10,
          );
        },
      ),
    );
  });

  it.each([
    [0, ' 00000+0'],
    [0.000056789, ' 56789-4'],
    [-0.11606e-4, '-11606-4'],
    [0.5, ' 50000+0'],
    [1, ' 10000+1'],
    [1e-12, ' 00000+0'],
  ])('writes %f as "%s"', (value, text) => {
    expect(exponentText(value)).toBe(text);
    expect(exponentValue(text)).toBeCloseTo(value, 9);
  });
});
