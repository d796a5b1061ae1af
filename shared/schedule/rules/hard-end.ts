import { intersect, SECOND_MS } from '../../time.ts';
import { faceLabel, satelliteName, type PlanContext } from '../context.ts';
import { guardMs } from '../holding.ts';
import { subtract, widen } from '../intervals.ts';
import type { Violation } from '../model.ts';
import { directionWord, type PlanLeg } from '../plan-legs.ts';
import { clockSpan, spoken } from '../words.ts';

function judgeLeg(context: PlanContext, own: PlanLeg): Violation[] {
  const { contact, direction, leg, pass, satellite } = own;
  const up = pass && intersect(leg, pass);
  if (!up || !satellite) return [];
  const overhang = direction === 'receive' ? guardMs(context.day.station, satellite) : 0;
  const within = context
    .hardEndOf(contact.passId, contact.faceId, direction)
    .map((interval) => widen(interval, overhang));
  return subtract(up, within).map((beyond) => ({
    rule: 'hard-end',
    message:
      `The ${directionWord(direction)} of ${satelliteName(context, contact.satelliteId)} from ${clockSpan(beyond)} ` +
      `lies beyond the hard end of ${faceLabel(context, contact.faceId)} for ${spoken(beyond.toMs - beyond.fromMs)}; no beam may be steered there.`,
    contactIds: [contact.id],
    ...beyond,
    value: (beyond.toMs - beyond.fromMs) / SECOND_MS,
    limit: 0,
    unit: 's',
  }));
}

/** Nothing lies beyond a face's hard end (grating lobe, last row of its loss table, hardware). */
export const judgeHardEnd = (context: PlanContext, legs: readonly PlanLeg[]): Violation[] =>
  legs.filter(({ own }) => own).flatMap((own) => judgeLeg(context, own));
