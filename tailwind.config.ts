import type { Config } from 'tailwindcss';

/** Components know roles only; the values of both themes stand in src/index.css. */
const ROLES = [
  'surface',
  'raised',
  'sunken',
  'ink',
  'ink-muted',
  'ink-faint',
  'line',
  'line-soft',
  'line-strong',
  'accent',
  'accent-soft',
  'on-accent',
  'focus',
  'sheet',
  'shade',
  'land',
  'rule',
  'rule-soft',
  'iso',
  'hatch',
  ...['ok', 'info', 'warn', 'danger', 'neutral'].flatMap((state) => [
    `${state}-text`,
    `${state}-soft`,
    `${state}-mark`,
  ]),
  ...[1, 2, 3, 4, 5, 6].map((place) => `series-${place}`),
];

export default {
  content: ['./index.html', './src/**/*.{ts,tsx}'],
  theme: {
    colors: {
      transparent: 'transparent',
      current: 'currentColor',
      ...Object.fromEntries(ROLES.map((role) => [role, `var(--${role})`])),
    },
    fontFamily: {
      sans: ['"Atkinson Hyperlegible Next Variable"', 'system-ui', 'sans-serif'],
      mono: ['"Atkinson Hyperlegible Mono Variable"', 'ui-monospace', 'monospace'],
    },
    fontSize: {
      caption: ['0.75rem', '1rem'],
      table: ['0.8125rem', '1.125rem'],
      body: ['0.875rem', '1.25rem'],
      section: ['1rem', '1.375rem'],
      page: ['1.25rem', '1.625rem'],
      display: ['2.125rem', '2.5rem'],
      countdown: ['3rem', '3.25rem'],
      mono: ['0.78125rem', '1.125rem'],
    },
    borderRadius: {
      none: '0',
      mark: '2px',
      chip: '4px',
      control: '5px',
      panel: '6px',
      full: '9999px',
    },
    boxShadow: { none: 'none', float: 'var(--shadow-float)' },
    screens: { narrow: '900px', drawer: '1180px', desk: '1440px', wide: '1720px' },
    extend: {
      transitionDuration: { control: '120ms', panel: '160ms' },
    },
  },
} satisfies Config;
