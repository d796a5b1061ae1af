/**
 * iCalendar (RFC 5545): the short part of it that a list of contacts needs. No METHOD (a snapshot, no scheduling
 * transaction), every instant in UTC, so no time zones.
 */

export interface CalendarEvent {
  uid: string;
  /** When the event was last revised, ms UTC. */
  stampMs: number;
  /** Only ever rises. */
  sequence: number;
  fromMs: number;
  toMs: number;
  status: 'TENTATIVE' | 'CONFIRMED' | 'CANCELLED';
  summary: string;
  description: string;
  location: string;
}

const CRLF = '\r\n';
const FOLD_OCTETS = 75;

/** TEXT: backslash, semicolon and comma escaped, line breaks as \n, other control characters taken out. */
export const escapeText = (text: string): string =>
  text
    .replace(/\\/g, '\\\\')
    .replace(/;/g, '\\;')
    .replace(/,/g, '\\,')
    .replace(/\r\n|\r|\n/g, '\\n')
    // eslint-disable-next-line no-control-regex -- control characters are what is taken out
    .replace(/[\u0000-\u0008\u000b-\u001f\u007f]/g, '');

/** Folds after 75 octets, the blank of the continuation counted, and never inside a character. */
export const fold = (line: string): string => {
  const lines: string[] = [];
  let current = '';
  let octets = 0;
  for (const character of line) {
    const size = new TextEncoder().encode(character).length;
    if (octets + size > FOLD_OCTETS) {
      lines.push(current);
      current = ' ';
      octets = 1;
    }
    current += character;
    octets += size;
  }
  return [...lines, current].join(CRLF);
};

/** `20261202T093750Z`. */
const instant = (ms: number): string =>
  `${new Date(ms).toISOString().replace(/[-:]/g, '').slice(0, 15)}Z`;

const SECOND = 1000;
const eventLines = (event: CalendarEvent): string[] => [
  'BEGIN:VEVENT',
  `UID:${escapeText(event.uid)}`,
  `DTSTAMP:${instant(event.stampMs)}`,
  `LAST-MODIFIED:${instant(event.stampMs)}`,
  `SEQUENCE:${event.sequence}`,
  // Whole seconds outward: an entry never ends before its contact does.
  `DTSTART:${instant(Math.floor(event.fromMs / SECOND) * SECOND)}`,
  `DTEND:${instant(Math.ceil(event.toMs / SECOND) * SECOND)}`,
  `STATUS:${event.status}`,
  'TRANSP:TRANSPARENT',
  `SUMMARY:${escapeText(event.summary)}`,
  `DESCRIPTION:${escapeText(event.description)}`,
  `LOCATION:${escapeText(event.location)}`,
  'END:VEVENT',
];

export const writeCalendar = (name: string, events: readonly CalendarEvent[]): string =>
  [
    'BEGIN:VCALENDAR',
    'VERSION:2.0',
    'PRODID:-//Skysheaf//Plan//EN',
    'CALSCALE:GREGORIAN',
    `NAME:${escapeText(name)}`,
    'REFRESH-INTERVAL;VALUE=DURATION:PT15M',
    ...events.flatMap(eventLines),
    'END:VCALENDAR',
  ]
    .map((line) => fold(line) + CRLF)
    .join('');
