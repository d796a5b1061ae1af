import type { PlanFacts } from '../../../shared/schemas/plan.ts';
import { closuresOf } from '../../../shared/schedule/closures.ts';
import { holding } from '../../../shared/schedule/holding.ts';
import { toIso } from '../../../shared/time.ts';
import type { Person } from '../../deps.ts';
import { visibleTo } from '../../visible-to.ts';
import type { PlanView } from './plan-read.service.ts';

const instants = ({ fromMs, toMs }: { fromMs: number; toMs: number }) => ({
  fromUtc: toIso(fromMs),
  toUtc: toIso(toMs),
});

/** What the client draws while somebody drags: it never decides. Foreign passes are left out for leads. */
export const presentFacts = (view: PlanView, person: Person): PlanFacts => {
  const { world, contacts } = view;
  const visible = visibleTo(person);
  const sees = (passId: string): boolean =>
    visible.mission(world.context.passes.get(passId)?.missionId ?? null);
  return {
    windows: world.facts.windows
      .filter((window) => sees(window.passId))
      .map(({ fromMs, toMs, ...window }) => ({ ...window, ...instants({ fromMs, toMs }) })),
    conflicts: world.facts.conflicts
      .filter(({ passIds }) => passIds.every(sees))
      .map((one) => ({
        faceId: one.faceId,
        direction: one.direction,
        passIds: one.passIds,
        separationHpbw: one.separationHpbw,
        requiredHpbw: one.requiredHpbw,
        ...instants(one),
      })),
    busy: [...contacts, ...world.day.neighbours].flatMap((contact) =>
      [contact.receive, contact.transmit].flatMap((leg) => {
        const channel = leg && world.context.channels.get(leg.channelId);
        const satellite = world.context.satellites.get(contact.satelliteId);
        if (!leg || !channel || !satellite) return [];
        const isOwn = contacts.includes(contact);
        return [
          {
            channelId: channel.id,
            contactId: isOwn ? contact.id : null,
            ...instants(holding(leg, channel, satellite)),
          },
        ];
      }),
    ),
    closures: presentClosures(view),
  };
};

const presentClosures = ({ world }: PlanView): PlanFacts['closures'] => {
  const found = new Map<string, PlanFacts['closures'][number]>();
  for (const channel of world.day.channels)
    for (const one of closuresOf(world.day, channel)) {
      const fromMs = Math.max(one.fromMs, world.day.day.fromMs);
      const toMs = Math.min(one.toMs, world.day.day.toMs);
      if (fromMs >= toMs) continue;
      const known = found.get(one.closure.id);
      if (known) known.channelIds.push(channel.id);
      else
        found.set(one.closure.id, {
          id: one.closure.id,
          channelIds: [channel.id],
          reason: one.closure.reason,
          ...instants({ fromMs, toMs }),
        });
    }
  return [...found.values()];
};
