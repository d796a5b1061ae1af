import type { OmmField, OmmRecord } from './omm-record.ts';
import { OMM_KEYWORDS, OMM_UNITS, OMM_VERSIONS } from './omm-record.ts';
import { FormFault } from './text-cursor.ts';

const VERSION = 'CCSDS_OMM_VERS';
const LONGEST_LINE = 254;
/** The keywords that are read, in their order; blocks that follow them are passed over. */
const ORDER: readonly string[] = [
  VERSION,
  ...OMM_KEYWORDS.header,
  ...OMM_KEYWORDS.metadata,
  ...OMM_KEYWORDS.meanElements,
  ...OMM_KEYWORDS.tleParameters,
];
/** Spacecraft parameters, covariance and agreed keywords, which say nothing about the orbit. */
const OTHER_BLOCKS =
  /^(MASS|SOLAR_RAD_(AREA|COEFF)|DRAG_(AREA|COEFF)|COV_REF_FRAME|C[XYZ](_DOT)?_[XYZ](_DOT)?|USER_DEFINED_\w+)$/;

interface KvnLine {
  number: number;
  text: string;
}

const fail = (line: KvnLine, code: string, reason: string, column = 1): never => {
  throw new FormFault({ line: line.number, column, code, reason });
};

function checkCharacters(line: KvnLine): void {
  const place = line.text.search(/[^ -~]/);
  if (place >= 0)
    fail(
      line,
      'KVN_CHARACTERS',
      'A tab or a character outside printable ASCII stands here.',
      place + 1,
    );
  if (line.text.length > LONGEST_LINE)
    fail(
      line,
      'KVN_LINE_LENGTH',
      `The line is longer than ${LONGEST_LINE} characters.`,
      LONGEST_LINE + 1,
    );
}

/** Keyword and value of a line, the unit checked and taken off. */
function entryOf(line: KvnLine): [keyword: string, field: OmmField] {
  const equals = line.text.indexOf('=');
  if (equals < 0)
    fail(line, 'KVN_SYNTAX', 'The line has no equals sign; it must read KEYWORD = value.');
  const keyword = line.text.slice(0, equals).trim();
  if (!ORDER.includes(keyword) && !OTHER_BLOCKS.test(keyword)) {
    const reason = `${keyword} is not a keyword of an orbit mean-elements message (they are in capitals).`;
    fail(line, 'KVN_KEYWORD', reason);
  }
  const after = line.text.slice(equals + 1);
  const [, value = '', , unit] = /^\s*(.*?)\s*(\[([^\]]*)\])?\s*$/.exec(after) ?? [];
  const column = equals + 2 + (after.length - after.trimStart().length);
  if (unit !== undefined && ORDER.includes(keyword) && OMM_UNITS[keyword] !== unit) {
    const reason = `The unit of ${keyword} is [${unit}]; the standard wants ${OMM_UNITS[keyword] ? `[${OMM_UNITS[keyword]}]` : 'none'}.`;
    fail(line, 'OMM_UNITS', reason, column);
  }
  return [keyword, { kind: 'text', text: value, line: line.number, column }];
}

/** Reads one message from its version line on. */
function recordOf(lines: readonly KvnLine[]): OmmRecord {
  const fields = new Map<string, OmmField>();
  let lastPlace = -1;
  for (const line of lines) {
    checkCharacters(line);
    if (/^\s*COMMENT\b/.test(line.text)) continue;
    const [keyword, field] = entryOf(line);
    if (OTHER_BLOCKS.test(keyword)) continue;
    if (fields.has(keyword)) fail(line, 'OMM_DUPLICATE_KEY', `${keyword} stands there twice.`);
    if (keyword === VERSION && !OMM_VERSIONS.includes(field.text)) {
      const reason = `The version is ${field.text}; ${OMM_VERSIONS.join(' and ')} are read.`;
      fail(line, 'OMM_VERSION', reason, field.column);
    }
    const place = ORDER.indexOf(keyword);
    if (place < lastPlace)
      fail(
        line,
        'KVN_ORDER',
        `${keyword} comes too late; the standard fixes the order of keywords.`,
      );
    lastPlace = place;
    fields.set(keyword, field);
  }
  return { line: lines[0]?.number ?? 1, column: 1, fields };
}

/** Orbit mean-elements messages in keyword = value notation (CCSDS 502.0-B-3, section 7), one after the other. */
export function ommRecordsOfKvn(text: string): OmmRecord[] {
  const lines = text
    .split(/\r\n|\n\r|\n|\r/)
    .map((raw, index): KvnLine => ({ number: index + 1, text: raw }))
    .filter((line) => line.text.trim() !== '');
  const begins = (line: KvnLine): boolean => line.text.trimStart().startsWith(VERSION);
  const [first] = lines;
  if (first && !begins(first))
    fail(
      first,
      'KVN_FIRST_LINE',
      `The first line must give ${VERSION}, for example ${VERSION} = 3.0.`,
    );
  const messages: KvnLine[][] = [];
  for (const line of lines) {
    if (begins(line)) messages.push([]);
    messages.at(-1)?.push(line);
  }
  return messages.map(recordOf);
}
