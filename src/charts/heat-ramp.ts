/** The one-hue ramp of the sheaf, dB below the peak; mission rings stay readable on it. */
export type Rgb = readonly [r: number, g: number, b: number];

export const RAMP_DB = [-45, -40, -30, -20, -13, -6, -3, 0] as const;

const hex = (text: string): Rgb => [
  parseInt(text.slice(1, 3), 16),
  parseInt(text.slice(3, 5), 16),
  parseInt(text.slice(5, 7), 16),
];
const RAMPS: Record<'light' | 'dark', Rgb[]> = {
  light: [
    '#fffefb',
    '#f4f3ee',
    '#dbe0e2',
    '#a9b9c6',
    '#6f8aa3',
    '#3b5a7c',
    '#244061',
    '#0f2136',
  ].map(hex),
  dark: [
    '#0f1319',
    '#131a22',
    '#1c2a37',
    '#2f4a60',
    '#55788f',
    '#92b0c0',
    '#bcd1d9',
    '#eef4f4',
  ].map(hex),
};

/** Whole tenths of a decibel, made once: a frame reads 57,600 of them. */
const TABLES: Record<'light' | 'dark', Rgb[]> = { light: table('light'), dark: table('dark') };

function table(theme: 'light' | 'dark'): Rgb[] {
  return Array.from({ length: 451 }, (_, i) => between(RAMPS[theme], -45 + i / 10));
}

function between(ramp: readonly Rgb[], db: number): Rgb {
  const at = Math.max(
    1,
    RAMP_DB.findIndex((step) => step >= db),
  );
  const [low, high] = [RAMP_DB[at - 1] ?? -45, RAMP_DB[at] ?? 0];
  const share = Math.max(0, Math.min(1, (db - low) / (high - low)));
  const [a, b] = [ramp[at - 1] ?? [0, 0, 0], ramp[at] ?? [0, 0, 0]];
  const mix = (i: 0 | 1 | 2): number => Math.round(a[i] + (b[i] - a[i]) * share);
  return [mix(0), mix(1), mix(2)];
}

export function rampColor(theme: 'light' | 'dark', db: number): Rgb {
  const at = Math.max(0, Math.min(450, Math.round((db + 45) * 10)));
  return TABLES[theme][at] ?? [0, 0, 0];
}
