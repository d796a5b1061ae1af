/**
 * The fixed columns of the two-line form (1-based, as the format's description prints them) and what each may hold.
 * Source of the layout: FAQ of the two-line element set format; Alpha-5 numbering as published with it.
 */

export interface TleField {
  /** As a reader would call it. */
  words: string;
  from: number;
  to: number;
  pattern: RegExp;
  /** Code of the fault when the pattern does not fit. */
  code: string;
  hint: string;
}

const angle = (words: string, from: number): TleField => ({
  words,
  from,
  to: from + 7,
  pattern: /^(\d{3}| \d{2}| {2}\d| {3})\.\d{4}$/,
  code: 'TLE_NUMBER',
  hint: 'three digits, a point and four decimals',
});

const exponent = (words: string, from: number): TleField => ({
  words,
  from,
  to: from + 7,
  pattern: /^[ +-](\d{5}| {1,4}\d{1,4})[ +-]\d$/,
  code: 'TLE_EXPONENT',
  hint: 'a sign, five digits and a signed exponent digit, such as " 56789-4" for 0.000056789',
});

const counter = (words: string, from: number, to: number): TleField => ({
  words,
  from,
  to,
  pattern: /^ *\d*$/,
  code: 'TLE_NUMBER',
  hint: 'a whole number',
});

export const LINE_1 = {
  epochYear: {
    words: 'epoch year',
    from: 19,
    to: 20,
    pattern: /^\d{2}$/,
    code: 'TLE_NUMBER',
    hint: 'two digits',
  },
  epochDay: {
    words: 'epoch day',
    from: 21,
    to: 32,
    pattern: /^\d{3}\.\d{8}$/,
    code: 'TLE_NUMBER',
    hint: 'three digits, a point and eight decimals',
  },
  meanMotionDot: {
    words: 'first derivative of the mean motion',
    from: 34,
    to: 43,
    pattern: /^[ +-]\.\d{8}$/,
    code: 'TLE_NUMBER',
    hint: 'a sign or blank, a point and eight decimals',
  },
  meanMotionDdot: exponent('second derivative of the mean motion', 45),
  bstar: exponent('drag term B*', 54),
  ephemerisType: {
    words: 'ephemeris type',
    from: 63,
    to: 63,
    pattern: /^[ 02]$/,
    code: 'EPHEMERIS_TYPE',
    hint: '0: other types belong to other orbit models and would be silently wrong with SGP4',
  },
  setNumber: counter('element set number', 65, 68),
} as const satisfies Record<string, TleField>;

export const LINE_2 = {
  inclination: angle('inclination', 9),
  raan: angle('right ascension of the ascending node', 18),
  eccentricity: {
    words: 'eccentricity',
    from: 27,
    to: 33,
    pattern: /^\d{7}$/,
    code: 'TLE_NUMBER',
    hint: 'seven digits without a point',
  },
  argumentOfPerigee: angle('argument of perigee', 35),
  meanAnomaly: angle('mean anomaly', 44),
  meanMotion: {
    words: 'mean motion',
    from: 53,
    to: 63,
    pattern: /^(\d{2}| \d| {2})\.\d{8}$/,
    code: 'TLE_NUMBER',
    hint: 'two digits, a point and eight decimals',
  },
  revolution: counter('revolution number', 64, 68),
} as const satisfies Record<string, TleField>;

/** Columns that must be blank. */
export const BLANK_COLUMNS = {
  1: [2, 9, 18, 33, 44, 53, 62, 64],
  2: [2, 8, 17, 26, 34, 43, 52],
} as const;

export const LINE_LENGTH = 69;
/** Name lines hold at most this many characters. */
export const NAME_LENGTH = 24;
export const CATALOG = { from: 3, to: 7 } as const;

export const fieldText = (line: string, field: { from: number; to: number }): string =>
  line.slice(field.from - 1, field.to);

/** Sum of the digits of columns 1-68, each minus sign counting 1, modulo 10. */
export function checksum(line: string): number {
  let sum = 0;
  for (const character of line.slice(0, LINE_LENGTH - 1)) {
    if (character >= '0' && character <= '9') sum += Number(character);
    else if (character === '-') sum += 1;
  }
  return sum % 10;
}

/** Value of a field with an assumed leading point and a signed exponent, such as `-11606-4` = -0.11606e-4. */
export function exponentValue(text: string): number {
  const sign = text.startsWith('-') ? -1 : 1;
  const digits = text.slice(1, 6).replaceAll(' ', '0');
  return sign * Number(`0.${digits}e${text.slice(6).replace(' ', '+')}`);
}

/** First letters of Alpha-5 numbers in order: A = 10 ... Z = 33; I and O are not used. */
const ALPHA_5 = 'ABCDEFGHJKLMNPQRSTUVWXYZ';

/** Catalogue number of the five columns, or the code of what is wrong with them. */
export function catalogNumberOf(text: string): number | 'TLE_ALPHA5_LETTER' | 'TLE_CATALOG' {
  if (/^ *\d+$/.test(text)) return Number(text);
  if (!/^[A-Z]\d{4}$/.test(text)) return 'TLE_CATALOG';
  const letter = ALPHA_5.indexOf(text.charAt(0));
  return letter < 0 ? 'TLE_ALPHA5_LETTER' : (letter + 10) * 10_000 + Number(text.slice(1));
}

/** A number in the five columns, as Alpha-5 where needed; 00000 when the form cannot hold it. */
export function catalogText(number: number): string {
  if (number < 100_000) return String(number).padStart(5, '0');
  const letter = ALPHA_5.charAt(Math.floor(number / 10_000) - 10);
  return letter === '' ? '00000' : `${letter}${String(number % 10_000).padStart(4, '0')}`;
}

/** A value in the form with an assumed leading point: ` 56789-4` for 0.000056789; below 1e-10 it is zero. */
export function exponentText(value: number): string {
  const [size, sign] = [Math.abs(value), value < 0 ? '-' : ' '];
  if (size < 1e-10) return ' 00000+0';
  // toExponential writes 5.6789e-5; the assumed point stands one place further left.
  const [digits = '', exponent = '0'] = size.toExponential(4).split('e');
  const shifted = Number(exponent) + 1;
  const mantissa = digits.replace('.', '');
  return `${sign}${mantissa}${shifted < 0 ? '-' : '+'}${Math.abs(shifted)}`;
}
