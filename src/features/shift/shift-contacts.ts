import type { Contact, Plan } from '../../../shared/schemas/plan.ts';
import { isHidden } from '../../../shared/schemas/plan.ts';
import { fromIso } from '../../../shared/time.ts';

/** A contact of the shift with the plan that holds it. */
export interface ShiftContact {
  contact: Contact;
  plan: Plan;
  fromMs: number;
  toMs: number;
}

export interface ShiftSplit {
  /** Soonest end first. */
  running: ShiftContact[];
  /** Soonest beginning first. */
  coming: ShiftContact[];
  /** Over and not logged yet, newest first. */
  toLog: ShiftContact[];
}

export const shiftContacts = (plans: readonly Plan[]): ShiftContact[] =>
  plans.flatMap((plan) =>
    plan.contacts.flatMap((contact) =>
      isHidden(contact)
        ? []
        : [
            {
              contact,
              plan,
              fromMs: fromIso(contact.receive.fromUtc),
              toMs: fromIso(contact.receive.toUtc),
            },
          ],
    ),
  );

export const splitShift = (
  contacts: readonly ShiftContact[],
  nowMs: number,
  logged: ReadonlySet<string>,
): ShiftSplit => ({
  running: contacts
    .filter((one) => one.fromMs <= nowMs && nowMs < one.toMs)
    .sort((a, b) => a.toMs - b.toMs),
  coming: contacts.filter((one) => nowMs < one.fromMs).sort((a, b) => a.fromMs - b.fromMs),
  toLog: contacts
    .filter((one) => one.toMs <= nowMs && !logged.has(one.contact.id))
    .sort((a, b) => b.toMs - a.toMs),
});
