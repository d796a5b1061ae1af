import { describe, expect, it } from 'vitest';
import type { AnyContact, Plan } from '../../shared/schemas/plan.ts';
import { withEdits } from './plan-queries.ts';

const contact = (id: string, locked: boolean): AnyContact =>
  // Only what the merging looks at.
  ({ id, locked }) as unknown as AnyContact;
const plan = {
  version: 7,
  contacts: [contact('a', false), contact('b', false), contact('c', true)],
} as unknown as Plan;

describe('a plan after edits', () => {
  it('keeps the order, takes changes in place, drops what was removed and adds what is new', () => {
    const after = withEdits(plan, {
      version: 8,
      contacts: [contact('b', true), contact('d', false)],
      removedIds: ['a'],
      inverse: [],
      violations: [],
    });
    expect(after.version).toBe(8);
    expect(after.contacts).toEqual([contact('b', true), contact('c', true), contact('d', false)]);
    expect(plan.contacts).toHaveLength(3);
  });

  it('does not bring back a contact that the same edit removed', () => {
    const after = withEdits(plan, {
      version: 9,
      contacts: [contact('c', false)],
      removedIds: ['c'],
      inverse: [],
      violations: [],
    });
    expect(after.contacts.map(({ id }) => id)).toEqual(['a', 'b']);
  });
});
