import { instantFault, instantOf } from './ccsds-time.ts';
import { rangeFaults, type MeanElements, type RangedField } from '../element-ranges.ts';
import type { ElementFault, ReadElementSet } from '../element-set.ts';
import type { OmmField, OmmRecord } from './omm-record.ts';
import { twoLineForm } from './two-line-form.ts';

/** A published set in JSON or CSV leaves out what is the same in all; a message of the standard must say it. */
export type OmmOrigin = 'message' | 'convention';

const NEEDED = [
  'OBJECT_NAME',
  'OBJECT_ID',
  'EPOCH',
  'MEAN_MOTION',
  'ECCENTRICITY',
  'INCLINATION',
  'RA_OF_ASC_NODE',
  'ARG_OF_PERICENTER',
  'MEAN_ANOMALY',
  'NORAD_CAT_ID',
  'BSTAR',
];
const NEEDED_IN_MESSAGES = [
  'CREATION_DATE',
  'ORIGINATOR',
  'CENTER_NAME',
  'REF_FRAME',
  'TIME_SYSTEM',
  'MEAN_ELEMENT_THEORY',
];

/** What SGP4 is for: another value is another model, silently wrong. */
const FIXED: { keyword: string; values: string[]; code: string }[] = [
  { keyword: 'CENTER_NAME', values: ['EARTH'], code: 'OMM_CENTER' },
  { keyword: 'REF_FRAME', values: ['TEME'], code: 'OMM_REF_FRAME' },
  { keyword: 'TIME_SYSTEM', values: ['UTC'], code: 'OMM_TIME_SYSTEM' },
  { keyword: 'MEAN_ELEMENT_THEORY', values: ['SGP4', 'SGP/SGP4'], code: 'OMM_THEORY' },
  { keyword: 'EPHEMERIS_TYPE', values: ['0', '2'], code: 'EPHEMERIS_TYPE' },
];

const NUMBER = /^[+-]?(\d+\.?\d*|\.\d+)(e[+-]?\d{1,3})?$/i;
const OBJECT_ID = /^(\d{4}-\d{3}[A-Z]{1,3}|UNKNOWN)$/;

const at = (
  place: { line: number; column: number },
  code: string,
  reason: string,
): ElementFault => ({
  line: place.line,
  column: place.column,
  code,
  reason,
});

function missingFault(record: OmmRecord, origin: OmmOrigin): ElementFault | null {
  const needed = origin === 'message' ? [...NEEDED_IN_MESSAGES, ...NEEDED] : NEEDED;
  const keyword = needed.find((name) => {
    const field = record.fields.get(name);
    return !field || field.kind === 'null' || field.text.trim() === '';
  });
  if (keyword === undefined) return null;
  const place = record.fields.get(keyword) ?? record;
  return at(place, 'OMM_MISSING', `${keyword} is missing or empty; every set must give it.`);
}

function fixedFault(record: OmmRecord): ElementFault | null {
  const axis = record.fields.get('SEMI_MAJOR_AXIS');
  if (axis) {
    const reason = 'SEMI_MAJOR_AXIS is given; sets for SGP4 must give MEAN_MOTION instead.';
    return at(axis, 'OMM_SEMI_MAJOR_AXIS', reason);
  }
  for (const { keyword, values, code } of FIXED) {
    const field = record.fields.get(keyword);
    const text = field?.text.trim() ?? '';
    if (!field || text === '' || values.includes(text.toUpperCase())) continue;
    const reason = `${keyword} is ${text}; only ${values[0]} is read, other values would be silently wrong.`;
    return at(field, code, reason);
  }
  return null;
}

function identityFault(record: OmmRecord): ElementFault | null {
  const [name, id, number] = ['OBJECT_NAME', 'OBJECT_ID', 'NORAD_CAT_ID'].map((keyword) =>
    record.fields.get(keyword),
  );
  if (name && /\p{Cc}/u.test(name.text))
    return at(name, 'OMM_NAME', 'OBJECT_NAME holds a line break or another control character.');
  if (id && !OBJECT_ID.test(id.text.trim())) {
    const reason = `OBJECT_ID is ${id.text.trim()}; it must read like 2026-001A, or UNKNOWN.`;
    return at(id, 'OMM_OBJECT_ID', reason);
  }
  if (number && !/^\d{1,9}$/.test(number.text.trim())) {
    const reason = `NORAD_CAT_ID is ${number.text.trim()}; it must be a whole number of at most nine digits.`;
    return at(number, 'OMM_CATALOG', reason);
  }
  return null;
}

function epochFault(field: OmmField | undefined): ElementFault | null {
  if (!field) return null;
  const fault = field.kind === 'text' ? instantFault(field.text.trim()) : 'format';
  if (fault === null) return null;
  if (fault === 'format') {
    const reason = `EPOCH is ${field.text}; it must read like 2026-05-03T10:57:46.570464 in UTC, without an offset.`;
    return at(field, 'EPOCH_FORMAT', reason);
  }
  return at(field, 'EPOCH_RANGE', `EPOCH is ${field.text}; ${fault}.`);
}

const KEYWORD_OF: Record<keyof MeanElements, string> = {
  meanMotionRevPerDay: 'MEAN_MOTION',
  eccentricity: 'ECCENTRICITY',
  inclinationDeg: 'INCLINATION',
  raanDeg: 'RA_OF_ASC_NODE',
  argumentOfPerigeeDeg: 'ARG_OF_PERICENTER',
  meanAnomalyDeg: 'MEAN_ANOMALY',
  bstar: 'BSTAR',
};
const keywordOf = (field: RangedField): string =>
  field === 'perigee' ? 'ECCENTRICITY' : KEYWORD_OF[field];

function numberFault(record: OmmRecord): ElementFault | null {
  for (const keyword of [...Object.values(KEYWORD_OF), 'MEAN_MOTION_DOT', 'MEAN_MOTION_DDOT']) {
    const field = record.fields.get(keyword);
    if (!field || field.kind === 'null') continue;
    const isBlank = field.text.trim() === '' && !Object.values(KEYWORD_OF).includes(keyword);
    if (isBlank || (field.kind !== 'other' && NUMBER.test(field.text.trim()))) continue;
    const reason = `${keyword} is ${field.text}; it must be a number with a decimal point and without a unit.`;
    return at(field, 'OMM_NUMBER', reason);
  }
  return null;
}

function elementsOf(record: OmmRecord): MeanElements {
  const value = (keyword: string): number => Number(record.fields.get(keyword)?.text ?? NaN);
  return {
    meanMotionRevPerDay: value('MEAN_MOTION'),
    eccentricity: value('ECCENTRICITY'),
    inclinationDeg: value('INCLINATION'),
    raanDeg: value('RA_OF_ASC_NODE'),
    argumentOfPerigeeDeg: value('ARG_OF_PERICENTER'),
    meanAnomalyDeg: value('MEAN_ANOMALY'),
    bstar: value('BSTAR'),
  };
}

/** Reads one message; the first fault found refuses it. */
export function readOmmRecord(record: OmmRecord, origin: OmmOrigin): ReadElementSet | ElementFault {
  const epoch = record.fields.get('EPOCH');
  const found =
    fixedFault(record) ??
    missingFault(record, origin) ??
    identityFault(record) ??
    epochFault(epoch) ??
    numberFault(record);
  if (found) return found;
  const elements = elementsOf(record);
  const range = rangeFaults(elements)[0];
  if (range) {
    const place = record.fields.get(keywordOf(range.field)) ?? record;
    return at(place, range.code, range.reason);
  }
  const text = (keyword: string): string => record.fields.get(keyword)?.text.trim() ?? '';
  const [catalogNumber, epochMs] = [Number(text('NORAD_CAT_ID')), instantOf(text('EPOCH'))];
  const objectId = text('OBJECT_ID');
  return {
    line: record.line,
    name: text('OBJECT_NAME'),
    catalogNumber,
    epochMs,
    ...twoLineForm({ catalogNumber, objectId, epochMs, ...elements }),
    ...elements,
  };
}
