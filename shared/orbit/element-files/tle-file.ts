import { collectSets } from './collect-sets.ts';
import type { ElementFault, ElementSetReading } from '../element-set.ts';
import { NAME_LENGTH } from './tle-columns.ts';
import { readTlePair, type FileLine, type TlePair } from './tle-set.ts';

/** The file cut into sets, with the faults of its structure and of single sets. */
interface Cutting {
  pairs: TlePair[];
  structure: ElementFault[];
  single: ElementFault[];
}

const structureFault = (line: FileLine, code: string, reason: string): ElementFault => ({
  line: line.number,
  column: 1,
  code,
  reason,
});

/** A data line begins with its number and a blank; a shorter text is a name, unless it stands where data must be. */
const isDataLine = (line: FileLine | undefined, number: '1' | '2'): line is FileLine =>
  line !== undefined && line.text.startsWith(number) && line.text.length > NAME_LENGTH;

const beginsWith = (line: FileLine | undefined, number: '1' | '2'): boolean =>
  line?.text.startsWith(`${number} `) ?? false;

/** A short line that begins with `1 ` is a cut first line, unless a whole first line follows it. */
const isFirstLine = (line: FileLine, next: FileLine | undefined): boolean =>
  isDataLine(line, '1') || (beginsWith(line, '1') && !isDataLine(next, '1'));

const nameOf = (line: FileLine): string => line.text.replace(/^0 /, '').trim();

function nameFault(line: FileLine): ElementFault | null {
  const name = nameOf(line);
  const control = line.text.search(/\p{Cc}/u);
  if (control >= 0) {
    const reason = 'The name holds a tab or another control character; use blanks.';
    return { line: line.number, column: control + 1, code: 'TLE_CHARACTERS', reason };
  }
  if (name.startsWith('<')) {
    const reason = 'This is a line of a web page, not a name; save the element sets as plain text.';
    return structureFault(line, 'TLE_NAME', reason);
  }
  if (name.length <= NAME_LENGTH) return null;
  const reason = `The name has ${name.length} characters; ${NAME_LENGTH} are allowed. Shorten it.`;
  return structureFault(line, 'TLE_NAME', reason);
}

function strayFault(line: FileLine, next: FileLine | undefined): ElementFault {
  if (beginsWith(line, '2'))
    return structureFault(
      line,
      'TLE_LINE_NUMBER',
      'Line 2 stands without a line 1 before it: put the lines in the order 1, 2.',
    );
  if (line.text.length > NAME_LENGTH + 2 || line.text.startsWith('<'))
    return structureFault(
      line,
      'TLE_NAME',
      'This is neither a line of elements nor a name: the file is not a two-line element file.',
    );
  const what = next ? 'another name follows instead of elements' : 'the file ends after it';
  return structureFault(
    line,
    'TLE_STRUCTURE',
    `"${nameOf(line)}" is a name without elements: ${what}. Remove it or add its lines 1 and 2.`,
  );
}

/** Cuts lines into (name,) line 1, line 2. */
function cut(lines: readonly FileLine[]): Cutting {
  const cutting: Cutting = { pairs: [], structure: [], single: [] };
  let index = 0;
  while (index < lines.length) {
    const line = lines[index];
    if (!line) break;
    const named = !isFirstLine(line, lines[index + 1]);
    const line1 = named ? lines[index + 1] : line;
    const first = named ? index + 1 : index;
    if (!line1 || !isFirstLine(line1, lines[first + 1]) || (named && beginsWith(line, '2'))) {
      cutting.structure.push(strayFault(line, line1));
      index += 1;
      continue;
    }
    const line2 = lines[first + 1];
    if (!line2 || !beginsWith(line2, '2')) {
      const reason = 'Line 1 is not followed by its line 2: add it or remove this line.';
      cutting.structure.push(structureFault(line1, 'TLE_STRUCTURE', reason));
      index = first + 1;
      continue;
    }
    const wrong = named ? nameFault(line) : null;
    if (wrong) cutting.single.push(wrong);
    else cutting.pairs.push({ name: named ? nameOf(line) : null, line1, line2 });
    index = first + 2;
  }
  return cutting;
}

/** Reads a text as two-line elements, with or without name lines, judged set by set. */
export function readTleText(text: string): ElementSetReading {
  const lines = text
    .split(/\r\n|\n|\r/)
    .map((raw, index): FileLine => ({ number: index + 1, text: raw.trimEnd() }))
    .filter((line) => line.text !== '');
  const { pairs, structure, single } = cut(lines);
  if (structure.length > 0)
    return { format: 'tle', accepted: [], refused: structure, unreadable: true };
  const { accepted, refused } = collectSets([...single, ...pairs.map(readTlePair)]);
  return { format: 'tle', accepted, refused, unreadable: false };
}
