import { describe, expect, it } from 'vitest';
import type { Contact, Plan } from '../../../shared/schemas/plan.ts';
import { shiftContacts, splitShift } from './shift-contacts.ts';

const contact = (id: string, from: string, to: string): Contact =>
  ({
    id,
    receive: {
      channelId: 'r',
      fromUtc: `2026-12-01T${from}:00.000Z`,
      toUtc: `2026-12-01T${to}:00.000Z`,
    },
  }) as Contact;
const plan = {
  contacts: [
    contact('past', '08:00', '08:10'),
    contact('logged', '08:20', '08:30'),
    contact('long', '08:50', '09:20'),
    contact('short', '08:55', '09:05'),
    contact('later', '10:00', '10:10'),
    contact('next', '09:00', '09:10'),
  ],
} as Plan;

describe('the contacts of a shift', () => {
  it('are running, coming, or wait for their log; ends are half-open', () => {
    const now = Date.parse('2026-12-01T08:59:59.000Z');
    const split = splitShift(shiftContacts([plan]), now, new Set(['logged']));
    const ids = (list: typeof split.running) => list.map((one) => one.contact.id);
    expect(ids(split.running)).toEqual(['short', 'long']);
    expect(ids(split.coming)).toEqual(['next', 'later']);
    expect(ids(split.toLog)).toEqual(['past']);
    const atStart = splitShift(shiftContacts([plan]), now + 1000, new Set());
    expect(ids(atStart.running)).toContain('next');
    const atEnd = splitShift(
      shiftContacts([plan]),
      Date.parse('2026-12-01T09:20:00.000Z'),
      new Set(),
    );
    expect(ids(atEnd.running)).toEqual([]);
    expect(ids(atEnd.toLog)).toEqual(['long', 'next', 'short', 'logged', 'past']);
  });
});
