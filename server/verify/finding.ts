import type { Rule, Violation } from '../../shared/schedule/model.ts';
import { described, type Suspect } from './legs.ts';

/** A broken rule in the words of the independent check. */
export function finding(
  rule: Rule,
  words: string,
  involved: readonly Suspect[],
  fromMs: number,
  toMs: number,
): Violation {
  return {
    rule,
    message: `Checked again: ${involved.map(described).join(' and ')}: ${words}.`,
    contactIds: [...new Set(involved.map(({ contact }) => contact.id))],
    fromMs,
    toMs,
    value: null,
    limit: null,
    unit: null,
  };
}
