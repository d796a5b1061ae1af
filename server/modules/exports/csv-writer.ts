import { stringify } from 'csv-stringify/sync';

/** A number, or a text that a spreadsheet must not take for a formula. */
export type Cell = { text: string } | { number: number; decimals: number } | null;

export const text = (value: string): Cell => ({ text: value });
export const number = (value: number, decimals: number): Cell => ({ number: value, decimals });

/** OWASP ASVS 5.0, 1.2.10: text that begins like a formula gets an apostrophe; numbers keep their sign. */
const guard = (value: string): string => (/^[=+\-@\t\r\0]/.test(value) ? `'${value}` : value);

const print = (cell: Cell): string => {
  if (cell === null) return '';
  return 'text' in cell ? guard(cell.text) : cell.number.toFixed(cell.decimals);
};

/** RFC 4180: a header row, CRLF, quotes where they are needed. */
export const writeCsv = (header: readonly string[], rows: readonly Cell[][]): string =>
  stringify([[...header], ...rows.map((row) => row.map(print))], { record_delimiter: 'windows' });
