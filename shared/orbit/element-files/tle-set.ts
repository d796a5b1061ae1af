import type { ElementFault, ReadElementSet } from '../element-set.ts';
import { rangeFaults, type MeanElements, type RangedField } from '../element-ranges.ts';
import { epochFault, epochOf } from '../epoch.ts';
import {
  BLANK_COLUMNS,
  CATALOG,
  catalogNumberOf,
  checksum,
  exponentValue,
  fieldText,
  LINE_1,
  LINE_2,
  LINE_LENGTH,
  type TleField,
} from './tle-columns.ts';

/** One line of the file with its number, 1-based. */
export interface FileLine {
  number: number;
  text: string;
}

export interface TlePair {
  name: string | null;
  line1: FileLine;
  line2: FileLine;
}

type Judgement = ElementFault | null;

const fault = (line: FileLine, column: number, code: string, reason: string): ElementFault => ({
  line: line.number,
  column,
  code,
  reason,
});

function characterFault(line: FileLine): Judgement {
  const index = line.text.search(/[^ -~]/);
  if (index < 0) return null;
  const code = line.text.codePointAt(index) ?? 0;
  const shown =
    code === 9 ? 'a tab' : `the character U+${code.toString(16).toUpperCase().padStart(4, '0')}`;
  const reason = `Column ${index + 1} holds ${shown}; only blanks and plain ASCII characters are allowed.`;
  return fault(line, index + 1, 'TLE_CHARACTERS', reason);
}

function lengthFault(line: FileLine): Judgement {
  const { length } = line.text;
  if (length === LINE_LENGTH) return null;
  const remedy =
    length === LINE_LENGTH - 1
      ? 'the checksum or another character is missing'
      : length < LINE_LENGTH
        ? 'the line is cut off; copy it again whole'
        : 'remove what follows column 69';
  const reason = `The line has ${length} characters instead of ${LINE_LENGTH}: ${remedy}.`;
  return fault(line, Math.min(length, LINE_LENGTH) + 1, 'TLE_LENGTH', reason);
}

function columnFault(line: FileLine, which: 1 | 2): Judgement {
  const column = BLANK_COLUMNS[which].find((at) => line.text.charAt(at - 1) !== ' ');
  if (column === undefined) return null;
  const reason = `Column ${column} of line ${which} must be blank; the data are shifted or run together.`;
  return fault(line, column, 'TLE_COLUMNS', reason);
}

function checksumFault(line: FileLine): Judgement {
  const [given, computed] = [line.text.charAt(LINE_LENGTH - 1), checksum(line.text)];
  if (given === String(computed)) return null;
  const reason = `The checksum is ${given} but the line sums to ${computed}: a character was changed; fetch the set again.`;
  return fault(line, LINE_LENGTH, 'TLE_CHECKSUM', reason);
}

const CATALOG_REASONS = {
  TLE_ALPHA5_LETTER: 'numbers above 99999 begin with a capital letter other than I and O',
  TLE_CATALOG: 'it must be five digits, or a capital letter and four digits',
};

function catalogFault(pair: TlePair): Judgement {
  const [first, second] = [
    fieldText(pair.line1.text, CATALOG),
    fieldText(pair.line2.text, CATALOG),
  ];
  const number = catalogNumberOf(first);
  if (typeof number === 'string') {
    const reason = `The catalogue number "${first}" is not valid: ${CATALOG_REASONS[number]}.`;
    return fault(pair.line1, CATALOG.from, number, reason);
  }
  if (catalogNumberOf(second) === number) return null;
  const reason = `Line 2 is of object ${second.trim()}, line 1 of ${first.trim()}: the two lines do not belong together.`;
  return fault(pair.line2, CATALOG.from, 'TLE_CATALOG_MISMATCH', reason);
}

function fieldFault(line: FileLine, fields: Record<string, TleField>): Judgement {
  for (const field of Object.values(fields)) {
    const text = fieldText(line.text, field);
    if (field.pattern.test(text)) continue;
    const reason = `The ${field.words} "${text}" (columns ${field.from}-${field.to}) must be ${field.hint}.`;
    return fault(line, field.from, field.code, reason);
  }
  return null;
}

function layoutFault(line: FileLine, which: 1 | 2): Judgement {
  return (
    characterFault(line) ?? lengthFault(line) ?? columnFault(line, which) ?? checksumFault(line)
  );
}

const RANGED_COLUMNS: Record<RangedField, { which: 1 | 2; from: number }> = {
  inclinationDeg: { which: 2, from: LINE_2.inclination.from },
  raanDeg: { which: 2, from: LINE_2.raan.from },
  eccentricity: { which: 2, from: LINE_2.eccentricity.from },
  argumentOfPerigeeDeg: { which: 2, from: LINE_2.argumentOfPerigee.from },
  meanAnomalyDeg: { which: 2, from: LINE_2.meanAnomaly.from },
  meanMotionRevPerDay: { which: 2, from: LINE_2.meanMotion.from },
  perigee: { which: 2, from: LINE_2.eccentricity.from },
  bstar: { which: 1, from: LINE_1.bstar.from },
};

function valueFault(pair: TlePair, elements: MeanElements): Judgement {
  const year = Number(fieldText(pair.line1.text, LINE_1.epochYear));
  const day = Number(fieldText(pair.line1.text, LINE_1.epochDay));
  const reason = epochFault(year, day);
  if (reason !== null) return fault(pair.line1, LINE_1.epochDay.from, 'EPOCH_RANGE', reason);
  const first = rangeFaults(elements)[0];
  if (!first) return null;
  const { which, from } = RANGED_COLUMNS[first.field];
  return fault(which === 1 ? pair.line1 : pair.line2, from, first.code, first.reason);
}

function meanElementsOf({ line1, line2 }: TlePair): MeanElements {
  const value = (field: TleField): number => Number(fieldText(line2.text, field));
  return {
    meanMotionRevPerDay: value(LINE_2.meanMotion),
    eccentricity: Number(`0.${fieldText(line2.text, LINE_2.eccentricity)}`),
    inclinationDeg: value(LINE_2.inclination),
    raanDeg: value(LINE_2.raan),
    argumentOfPerigeeDeg: value(LINE_2.argumentOfPerigee),
    meanAnomalyDeg: value(LINE_2.meanAnomaly),
    bstar: exponentValue(fieldText(line1.text, LINE_1.bstar)),
  };
}

/** Reads one pair of lines; the first fault found, in the order layout, identity, numbers, ranges, refuses the set. */
export function readTlePair(pair: TlePair): ReadElementSet | ElementFault {
  const { line1, line2 } = pair;
  const found =
    layoutFault(line1, 1) ??
    layoutFault(line2, 2) ??
    catalogFault(pair) ??
    fieldFault(line1, LINE_1) ??
    fieldFault(line2, LINE_2);
  if (found) return found;
  const elements = meanElementsOf(pair);
  const wrong = valueFault(pair, elements);
  if (wrong) return wrong;
  const year = Number(fieldText(line1.text, LINE_1.epochYear));
  return {
    line: line1.number,
    name: pair.name,
    catalogNumber: Number(catalogNumberOf(fieldText(line1.text, CATALOG))),
    epochMs: epochOf(year, Number(fieldText(line1.text, LINE_1.epochDay))),
    line1: line1.text,
    line2: line2.text,
    ...elements,
  };
}
