import type { ElementFormat, ElementSetReading } from './element-set.ts';
import { readOmmText, type OmmFormat } from './element-files/omm-file.ts';
import { readTleText } from './element-files/tle-file.ts';

export type { ElementFault, ElementSetReading, ReadElementSet } from './element-set.ts';

/** Larger uploads are refused: 2 MB hold some 14,000 two-line sets. */
export const LARGEST_FILE_BYTES = 2_000_000;

const unreadable = (
  line: number,
  column: number,
  code: string,
  reason: string,
): ElementSetReading => ({
  format: 'tle',
  accepted: [],
  refused: [{ line, column, code, reason }],
  unreadable: true,
});

/** Line and column, 1-based, of a byte. */
function placeOf(bytes: Uint8Array, index: number): [number, number] {
  let [line, start] = [1, 0];
  for (let at = 0; at < index; at++) {
    if (bytes[at] !== 10) continue;
    line += 1;
    start = at + 1;
  }
  return [line, index - start + 1];
}

const isUtf8 = (bytes: Uint8Array, isCut: boolean): boolean => {
  try {
    new TextDecoder('utf-8', { fatal: true }).decode(bytes, { stream: isCut });
    return true;
  } catch {
    return false;
  }
};

/** Index of the first byte of the first character that is not UTF-8. */
function firstBadByte(bytes: Uint8Array): number {
  let [good, bad] = [0, bytes.length + 1];
  while (bad - good > 1) {
    const middle = (good + bad) >> 1;
    if (isUtf8(bytes.subarray(0, middle), true)) good = middle;
    else bad = middle;
  }
  // The good part may end with the beginning of the bad character.
  while (good > 0 && !isUtf8(bytes.subarray(0, good), false)) good -= 1;
  return good;
}

/** The text of an upload, or the reading that says why it is none. The byte order mark is dropped. */
function textOf(bytes: Uint8Array): string | ElementSetReading {
  if (bytes.length > LARGEST_FILE_BYTES)
    return unreadable(1, 1, 'FILE_TOO_LARGE', 'The file is larger than 2 MB; split it.');
  const nul = bytes.indexOf(0);
  if (nul >= 0) {
    const reason =
      'The file holds a NUL byte: it is a binary file, not text. Upload a text file of element sets.';
    return unreadable(...placeOf(bytes, nul), 'FILE_BINARY', reason);
  }
  if (!isUtf8(bytes, false)) {
    const reason = 'The file is not valid UTF-8 text; save it as UTF-8 or plain ASCII.';
    return unreadable(...placeOf(bytes, firstBadByte(bytes)), 'FILE_ENCODING', reason);
  }
  return new TextDecoder().decode(bytes);
}

const EXTENSIONS: Readonly<Record<string, OmmFormat>> = {
  json: 'omm-json',
  csv: 'omm-csv',
  kvn: 'omm-kvn',
  omm: 'omm-kvn',
  xml: 'omm-xml',
};

/** The form of a file: by its first characters where they are telling, else by its name. */
function formatOf(text: string, fileName: string): ElementFormat {
  const start = text.trimStart();
  if (/^[[{]/.test(start)) return 'omm-json';
  if (/^CCSDS_\w+_VERS\b/.test(start)) return 'omm-kvn';
  if (/^<(\?xml\b|(\w+:)?(omm|ndm)\b)/.test(start)) return 'omm-xml';
  if (/^"?[A-Z_]+"?[,;]"?[A-Z_]+"?[,;]/.test(start)) return 'omm-csv';
  const extension = /\.(\w+)$/.exec(fileName.toLowerCase())?.[1] ?? '';
  return EXTENSIONS[extension] ?? 'tle';
}

/**
 * Reads an uploaded element file: two-line elements, or orbit mean-elements messages in JSON, CSV, KVN or XML. Pure and
 * without a clock: the age of a set and its trial propagation are judged afterwards (`element-acceptance.ts`). Sets are
 * judged one by one; a fault of structure makes the whole unreadable.
 */
export function readElementSets(bytes: Uint8Array, fileName: string): ElementSetReading {
  const text = textOf(bytes);
  if (typeof text !== 'string') return text;
  if (text.trim() === '')
    return unreadable(1, 1, 'FILE_EMPTY', 'The file is empty; choose a file with element sets.');
  const format = formatOf(text, fileName);
  return format === 'tle' ? readTleText(text) : readOmmText(text, format);
}
