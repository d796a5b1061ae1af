import { intersect } from '../../time.ts';
import { closuresOf } from '../closures.ts';
import { channelLabel, faceLabel, satelliteName, type PlanContext } from '../context.ts';
import type { ClosureModel, Violation } from '../model.ts';
import { directionWord, type PlanLeg } from '../plan-legs.ts';
import { clock } from '../words.ts';

/** `North face`, `channel R3` or the station's name. */
export function closedPlace(context: PlanContext, closure: ClosureModel): string {
  if (closure.scope === 'face') return faceLabel(context, closure.scopeId);
  if (closure.scope === 'channel') return `Channel ${channelLabel(context, closure.scopeId)}`;
  return 'The station';
}

export function closureWords(context: PlanContext, closure: ClosureModel): string {
  const until = closure.toMs === null ? 'until further notice' : `to ${clock(closure.toMs)}`;
  const what = closure.direction === 'both' ? '' : ` for ${closure.direction}`;
  return `${closedPlace(context, closure)} is closed${what} from ${clock(closure.fromMs)} ${until} (${closure.reason})`;
}

/** No leg where station, face or channel is closed for its direction. */
export const judgeClosure = (context: PlanContext, legs: readonly PlanLeg[]): Violation[] =>
  legs
    .filter(({ own }) => own)
    .flatMap(({ contact, leg, channel, direction }) =>
      (channel ? closuresOf(context.day, channel) : []).flatMap((closed) => {
        const during = intersect(leg, closed);
        if (!during) return [];
        const name = satelliteName(context, contact.satelliteId);
        return [
          {
            rule: 'closure' as const,
            message: `${closureWords(context, closed.closure)}; the ${directionWord(direction)} of ${name} lies in it.`,
            contactIds: [contact.id],
            ...during,
            value: null,
            limit: null,
            unit: null,
          },
        ];
      }),
    );
