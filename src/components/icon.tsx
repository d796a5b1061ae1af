/** Icons on a 16 grid, stroke 1.5, drawn from the job. One never stands without its word or an accessible name. */
const PATHS = {
  add: 'M8 3v10M3 8h10',
  approve: 'M8 1.75a6.25 6.25 0 1 0 0 12.5 6.25 6.25 0 0 0 0-12.5ZM5.2 8.2l2 2 3.6-4.1',
  arrowRight: 'M3 8h10M9.5 4.5 13 8l-3.5 3.5',
  beamsClose:
    'M6 4.25a3.75 3.75 0 1 0 0 7.5 3.75 3.75 0 0 0 0-7.5ZM10 4.25a3.75 3.75 0 1 0 0 7.5 3.75 3.75 0 0 0 0-7.5Z',
  calendar: 'M2.5 3.5h11v10h-11zM2.5 6.5h11M5.5 2v2.5M10.5 2v2.5',
  channelBusy: 'M2.5 3h11v4h-11zM2.5 9h11v4h-11z',
  check: 'm3 8.5 3.2 3.2L13 4.6',
  chevronDown: 'm4 6 4 4 4-4',
  chevronLeft: 'm10 3.5-4.5 4.5L10 12.5',
  chevronRight: 'M6 3.5 10.5 8 6 12.5',
  clock: 'M8 1.75a6.25 6.25 0 1 0 0 12.5 6.25 6.25 0 0 0 0-12.5ZM8 4.5V8l2.4 1.6',
  close: 'm3.5 3.5 9 9M12.5 3.5l-9 9',
  closure: 'M2 5h12v6H2zM4 11l3-6M7.5 11l3-6M11 11l2.4-4.8',
  duplicate: 'M5 5h8.5v8.5H5zM10.5 2.5h-8v8',
  file: 'M4 1.75h5L12.25 5v9.25H4zM9 1.75V5h3.25',
  free: 'M8 3v10M3 8h10',
  hash: 'M6.2 2.5 4.8 13.5M11.2 2.5 9.8 13.5M2.8 5.8h11M2.2 10.2h11',
  info: 'M8 1.75a6.25 6.25 0 1 0 0 12.5 6.25 6.25 0 0 0 0-12.5ZM8 7.2v4M8 4.6v.2',
  keepOut: 'M2 3.5c4-2 8-2 12 0L8 14ZM4.2 7c2.6-1.2 5-1.2 7.6 0M6 10.2c1.4-.6 2.6-.6 4 0',
  layers: 'm8 2 6 3-6 3-6-3zM2 8l6 3 6-3M2 11l6 3 6-3',
  lock: 'M3.5 7.25h9v6.25h-9zM5.5 7.25V5a2.5 2.5 0 0 1 5 0v2.25',
  unlock: 'M3.5 7.25h9v6.25h-9zM5.5 7.25V5a2.5 2.5 0 0 1 4.8-1',
  mail: 'M2 3.5h12v9H2zM2.3 4l5.7 4.8L13.7 4',
  menu: 'M2.5 4.5h11M2.5 8h11M2.5 11.5h11',
  minus: 'M3 8h10',
  more: 'M3.5 8h.01M8 8h.01M12.5 8h.01',
  moon: 'M13 9.6A5.6 5.6 0 0 1 6.4 3 5.6 5.6 0 1 0 13 9.6Z',
  move: 'M2 8h12M4.8 5.2 2 8l2.8 2.8M11.2 5.2 14 8l-2.8 2.8',
  needsAttention: 'M5.4 1.75h5.2l3.65 3.65v5.2l-3.65 3.65H5.4L1.75 10.6V5.4zM8 4.8v3.8M8 11v.2',
  partly: 'M8 1.75a6.25 6.25 0 1 0 0 12.5 6.25 6.25 0 0 0 0-12.5ZM5 8h6',
  pause: 'M5.5 3.5v9M10.5 3.5v9',
  pencil: 'm3 13 .8-3.2 7.4-7.4 2.4 2.4-7.4 7.4zM9.6 4l2.4 2.4',
  play: 'M5 3.2 12.5 8 5 12.8Z',
  print: 'M4.5 6V2.5h7V6M4.5 11.5h-2V6h11v5.5h-2M4.5 9.5h7v4h-7z',
  redo: 'M13 6.5H6a3.5 3.5 0 0 0 0 7h4M10.2 3.5l3 3-3 3',
  release: 'M3.5 14V2.5h9L10.2 6l2.3 3.5h-9',
  returned: 'M3 6.5h7a3.5 3.5 0 0 1 0 7H6M5.8 3.5l-3 3 3 3',
  search: 'M7 2.25a4.75 4.75 0 1 0 0 9.5 4.75 4.75 0 0 0 0-9.5ZM10.5 10.5 14 14',
  signOut: 'M6.5 2.5h-4v11h4M6 8h8M11 5l3 3-3 3',
  struck: 'M8 1.75a6.25 6.25 0 1 0 0 12.5 6.25 6.25 0 0 0 0-12.5ZM3.6 3.6l8.8 8.8',
  sun: 'M8 5a3 3 0 1 0 0 6 3 3 0 0 0 0-6ZM8 1.2v1.3M8 13.5v1.3M1.2 8h1.3M13.5 8h1.3M3.2 3.2l.9.9M11.9 11.9l.9.9M3.2 12.8l.9-.9M11.9 4.1l.9-.9',
  swap: 'M3 5.5h10M10.5 3 13 5.5 10.5 8M13 10.5H3M5.5 8 3 10.5 5.5 13',
  system: 'M2 3h12v8H2zM5.5 14h5M8 11v3',
  table: 'M2 3h12v10H2zM2 6.3h12M2 9.6h12M6 3v10',
  tooShort: 'M2.5 4v8M13.5 4v8M5 8h6M6.3 6.4 4.8 8l1.5 1.6M9.7 6.4 11.2 8 9.7 9.6',
  transmit: 'M8 13.5v-11M4.2 6.2 8 2.4l3.8 3.8',
  trim: 'M4 2.5l7 9M12 2.5l-7 9M3.8 11a1.75 1.75 0 1 0 0 3.5 1.75 1.75 0 0 0 0-3.5ZM12.2 11a1.75 1.75 0 1 0 0 3.5 1.75 1.75 0 0 0 0-3.5Z',
  undo: 'M3 6.5h7a3.5 3.5 0 0 1 0 7H6M5.8 3.5l-3 3 3 3',
  upload: 'M8 10.5v-8M4.8 5.4 8 2.2l3.2 3.2M2.5 10.5v3h11v-3',
  drifted: 'M1.5 9c1.2-3 2.6-3 3.8 0s2.6 3 3.8 0 1.9-2.6 3-1.6M14.5 8l-2.2-.9.4 2.5',
  outside: 'M2 12.5a6 6 0 0 1 12 0ZM8 12.5l4.2-2.4',
  warning: 'M8 2.2 14.4 13.3H1.6ZM8 6.3v3.4M8 11.4v.1',
} as const;

export type IconName = keyof typeof PATHS | 'inReview';

interface Props {
  name: IconName;
  size?: number;
  className?: string;
  /** Only where no word stands beside it. */
  label?: string;
}

export function Icon({ name, size = 16, className, label }: Props) {
  return (
    <svg
      width={size}
      height={size}
      viewBox="0 0 16 16"
      fill="none"
      stroke="currentColor"
      strokeWidth={name === 'more' ? 2.4 : 1.5}
      strokeLinecap="round"
      strokeLinejoin="round"
      className={`shrink-0 ${className ?? ''}`}
      role={label ? 'img' : undefined}
      aria-label={label}
      aria-hidden={label ? undefined : true}
    >
      {name === 'inReview' ? (
        <>
          <circle cx="8" cy="8" r="6.25" />
          <path d="M8 4.2v7.6a3.8 3.8 0 0 1 0-7.6Z" fill="currentColor" stroke="none" />
        </>
      ) : (
        <path d={PATHS[name]} />
      )}
    </svg>
  );
}
