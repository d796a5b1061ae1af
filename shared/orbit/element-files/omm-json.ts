import { FormFault } from './text-cursor.ts';
import { scanJson, type JsonValue } from './json-text.ts';
import type { OmmField, OmmRecord } from './omm-record.ts';
import type { ElementFault } from '../element-set.ts';

const fieldOf = (value: JsonValue): OmmField =>
  value.kind === 'object' || value.kind === 'array'
    ? { kind: 'other', text: 'a list or an object', line: value.line, column: value.column }
    : value;

/** OMM keywords in JSON (a publishers' convention, not CCSDS): an array of objects, or one object. */
export function ommRecordsOfJson(text: string): (OmmRecord | ElementFault)[] {
  const root = scanJson(text);
  const items = root.kind === 'array' ? root.items : [root];
  if (items.length === 0) {
    const reason = 'The list is empty; the file holds no element set.';
    throw new FormFault({ line: root.line, column: root.column, code: 'FILE_EMPTY', reason });
  }
  return items.map((item): OmmRecord | ElementFault => {
    const { line, column } = item;
    if (item.kind === 'object') {
      const members = [...item.members].map(([key, value]) => [key, fieldOf(value)] as const);
      return { line, column, fields: new Map(members) };
    }
    const reason =
      'An element set must be an object of OMM keywords, such as {"OBJECT_NAME": ...}.';
    return { line, column, code: 'OMM_NOT_OBJECT', reason };
  });
}
