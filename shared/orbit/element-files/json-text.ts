import type { OmmField } from './omm-record.ts';
import { TextCursor, type Place } from './text-cursor.ts';

/** JSON with the place of every value: `JSON.parse` knows none, and hides repeated keys. */
export type JsonValue =
  | ({ kind: 'object'; members: Map<string, JsonValue> } & Place)
  | ({ kind: 'array'; items: JsonValue[] } & Place)
  | OmmField;

const BLANKS = /[ \t\r\n]*/y;
const NUMBER = /-?(0|[1-9]\d*)(\.\d+)?([eE][+-]?\d+)?/y;
const PLAIN = /[^"\\\p{Cc}]*/uy;
const ESCAPE = /\\(["\\/bfnrt]|u[0-9a-fA-F]{4})/y;
const WORD = /true|false|null/y;
const DEEPEST = 20;

function scanString(cursor: TextCursor): string {
  const { place } = cursor;
  if (cursor.peek() !== '"')
    cursor.fail('JSON_SYNTAX', 'A text in double quotes is expected here.');
  let literal = cursor.take();
  for (;;) {
    literal += cursor.takeMatch(PLAIN);
    if (cursor.peek() === '"') break;
    const escape = cursor.takeMatch(ESCAPE);
    if (escape === '')
      cursor.fail('JSON_SYNTAX', 'The text that begins here is not closed on its line.', place);
    literal += escape;
  }
  return JSON.parse(literal + cursor.take()) as string;
}

function scanObject(cursor: TextCursor, depth: number): JsonValue {
  const { place } = cursor;
  const members = new Map<string, JsonValue>();
  cursor.take();
  cursor.takeMatch(BLANKS);
  while (cursor.peek() !== '}') {
    const keyPlace = cursor.place;
    const key = scanString(cursor);
    if (members.has(key))
      cursor.fail(
        'OMM_DUPLICATE_KEY',
        `${key} stands there twice; remove one of the two.`,
        keyPlace,
      );
    cursor.takeMatch(BLANKS);
    if (cursor.take() !== ':') cursor.fail('JSON_SYNTAX', `A colon must follow "${key}".`);
    members.set(key, scanValue(cursor, depth + 1));
    if (!scanComma(cursor, '}')) break;
  }
  cursor.take();
  return { kind: 'object', members, ...place };
}

/** Whether another item follows; otherwise the closing bracket must. */
function scanComma(cursor: TextCursor, closing: string): boolean {
  cursor.takeMatch(BLANKS);
  if (cursor.peek() === closing) return false;
  if (cursor.peek() !== ',') {
    const where = cursor.isAtEnd ? 'The file ends too early' : 'Something is missing here';
    cursor.fail('JSON_SYNTAX', `${where}: a comma or ${closing} is expected.`);
  }
  cursor.take();
  cursor.takeMatch(BLANKS);
  if (cursor.peek() === closing) cursor.fail('JSON_SYNTAX', 'Nothing follows this comma.');
  return true;
}

function scanArray(cursor: TextCursor, depth: number): JsonValue {
  const { place } = cursor;
  const items: JsonValue[] = [];
  cursor.take();
  cursor.takeMatch(BLANKS);
  while (cursor.peek() !== ']') {
    items.push(scanValue(cursor, depth + 1));
    if (!scanComma(cursor, ']')) break;
  }
  cursor.take();
  return { kind: 'array', items, ...place };
}

function scanValue(cursor: TextCursor, depth: number): JsonValue {
  cursor.takeMatch(BLANKS);
  const { place } = cursor;
  if (depth > DEEPEST) cursor.fail('JSON_SYNTAX', 'The values are nested too deeply.');
  const next = cursor.peek();
  if (next === '{') return scanObject(cursor, depth);
  if (next === '[') return scanArray(cursor, depth);
  if (next === '"') return { kind: 'text', text: scanString(cursor), ...place };
  const number = cursor.takeMatch(NUMBER);
  if (number !== '') return { kind: 'number', text: number, ...place };
  const word = cursor.takeMatch(WORD);
  if (word === 'null') return { kind: 'null', text: '', ...place };
  if (word !== '') return { kind: 'other', text: word, ...place };
  const where = cursor.isAtEnd ? 'The file ends too early' : 'This is no JSON value';
  return cursor.fail('JSON_SYNTAX', `${where}; numbers, texts in quotes, true, false or null are.`);
}

/** Scans a whole JSON text; throws a `FormFault` where it is none. */
export function scanJson(text: string): JsonValue {
  const cursor = new TextCursor(text);
  const value = scanValue(cursor, 0);
  cursor.takeMatch(BLANKS);
  if (!cursor.isAtEnd) cursor.fail('JSON_SYNTAX', 'Something follows the end of the JSON value.');
  return value;
}
