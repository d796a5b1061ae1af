import type { ElementFault } from '../element-set.ts';
import type { OmmField, OmmRecord } from './omm-record.ts';
import { TextCursor } from './text-cursor.ts';

/** A cell of RFC 4180 with the place where it begins. */
type Cell = OmmField;

const PLAIN = /[^",\r\n]*/y;
const QUOTED = /[^"]*/y;

function scanCell(cursor: TextCursor): Cell {
  const { place } = cursor;
  if (cursor.peek() !== '"') {
    const text = cursor.takeMatch(PLAIN);
    if (cursor.peek() === '"')
      cursor.fail('CSV_QUOTE', 'A quote stands inside a cell that does not begin with one.');
    return { kind: 'text', text, ...place };
  }
  cursor.take();
  let text = '';
  for (;;) {
    text += cursor.takeMatch(QUOTED);
    if (cursor.isAtEnd)
      cursor.fail('CSV_QUOTE', 'The quote that begins here is never closed.', place);
    cursor.take();
    if (cursor.peek() !== '"') break;
    text += cursor.take();
  }
  if (!cursor.isAtEnd && !/[,\r\n]/.test(cursor.peek()))
    cursor.fail('CSV_QUOTE', 'A comma or the end of the line must follow a closing quote.');
  return { kind: 'text', text, ...place };
}

function scanRows(text: string): Cell[][] {
  const cursor = new TextCursor(text);
  const rows: Cell[][] = [];
  while (!cursor.isAtEnd) {
    const row = [scanCell(cursor)];
    while (cursor.peek() === ',') {
      cursor.take();
      row.push(scanCell(cursor));
    }
    cursor.takeMatch(/\r?\n|\r|/y);
    if (row.length > 1 || row[0]?.text.trim() !== '') rows.push(row);
  }
  return rows;
}

const LEAST_COLUMNS = ['OBJECT_NAME', 'EPOCH', 'MEAN_MOTION', 'NORAD_CAT_ID'];
const NEEDED_COLUMNS = [
  ...LEAST_COLUMNS,
  'OBJECT_ID',
  'ECCENTRICITY',
  'INCLINATION',
  'RA_OF_ASC_NODE',
  'ARG_OF_PERICENTER',
  'MEAN_ANOMALY',
  'BSTAR',
];

/** The names of the header, or the fault thrown. */
function headerOf(row: readonly Cell[], cursor: TextCursor): string[] {
  const names = row.map(({ text }) => text.trim());
  const fail = (reason: string, index = 0): never =>
    cursor.fail('CSV_HEADER', reason, {
      line: row[index]?.line ?? 1,
      column: row[index]?.column ?? 1,
    });
  if (names.length === 1 && names[0]?.includes(';'))
    fail('The columns are separated by semicolons; separate them by commas.');
  const missing = NEEDED_COLUMNS.filter((name) => !names.includes(name));
  if (missing.length === NEEDED_COLUMNS.length)
    fail('The first line must name the columns: OBJECT_NAME, OBJECT_ID, EPOCH and so on.');
  if (missing.length > 0) fail(`The column ${missing[0]} is missing in the header.`);
  const twice = names.findIndex((name, index) => names.indexOf(name) !== index);
  if (twice >= 0) fail(`The column ${names[twice]} stands there twice.`, twice);
  return names;
}

/** OMM keywords in CSV (a publishers' convention, not CCSDS): a header, one set a row; unknown columns are ignored. */
export function ommRecordsOfCsv(text: string): (OmmRecord | ElementFault)[] {
  const cursor = new TextCursor(text);
  const [header, ...rows] = scanRows(text);
  const names = headerOf(header ?? [], cursor);
  if (rows.length === 0) cursor.fail('FILE_EMPTY', 'The file holds a header but no element set.');
  return rows.map((row): OmmRecord | ElementFault => {
    const { line = 1, column = 1 } = row[0] ?? {};
    if (row.length !== names.length) {
      const reason = `The row has ${row.length} cells, the header ${names.length}; they must agree.`;
      return { line, column, code: 'CSV_COLUMNS', reason };
    }
    const fields = row.map((cell, index) => [names[index] ?? '', cell] as const);
    return { line, column, fields: new Map(fields) };
  });
}
