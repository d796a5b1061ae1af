import { useCallback, type KeyboardEvent } from 'react';
import { usePlanDesk } from '../../hooks/plan-desk.ts';
import { usePlanEdits } from '../../hooks/plan-edits.ts';
import { usePlanView } from '../../hooks/plan-view.ts';
import { contactName, openContact, type PlanLeg } from '../../model/plan-legs.ts';

const focusLeg = (id: string): void =>
  document.querySelector<HTMLElement>(`[data-leg="${CSS.escape(id)}"]`)?.focus();

/** The leg that lies next in a direction: up and down in the column, left and right to the nearest in time. */
export function neighbourOf(
  leg: PlanLeg,
  legs: readonly PlanLeg[],
  { key, order }: { key: string; order: readonly string[] },
): PlanLeg | null {
  if (key === 'ArrowDown' || key === 'ArrowUp') {
    const own = legs
      .filter(({ channelId }) => channelId === leg.channelId)
      .sort((a, b) => a.fromMs - b.fromMs);
    return own[own.indexOf(leg) + (key === 'ArrowDown' ? 1 : -1)] ?? null;
  }
  const step = key === 'ArrowRight' ? 1 : -1;
  for (let at = order.indexOf(leg.channelId) + step; at >= 0 && at < order.length; at += step) {
    const there = legs.filter(({ channelId }) => channelId === order[at]);
    const nearest = there.sort(
      (a, b) => Math.abs(a.fromMs - leg.fromMs) - Math.abs(b.fromMs - leg.fromMs),
    )[0];
    if (nearest) return nearest;
  }
  return null;
}

/** Arrows walk; on a focused contact M moves, T trims, L locks, Delete takes it off. They act only on focus. */
export function useCalendarKeys(legs: readonly PlanLeg[]): (event: KeyboardEvent) => void {
  const { groups, allows } = usePlanDesk();
  const { open, apply } = usePlanEdits();
  const { selectContact } = usePlanView();
  return useCallback(
    (event: KeyboardEvent) => {
      const id = event.target instanceof HTMLElement ? event.target.dataset['leg'] : undefined;
      const leg = legs.find((one) => one.id === id);
      if (!leg || event.ctrlKey || event.metaKey || event.altKey) return;
      if (event.key.startsWith('Arrow')) {
        const order = groups.flatMap(({ columns }) => columns.map((column) => column.id));
        const next = neighbourOf(leg, legs, { key: event.key, order });
        event.preventDefault();
        if (next) focusLeg(next.id);
        return;
      }
      const contact = openContact(leg.contact);
      if (!contact || !allows('edit')) return;
      const act: Record<string, () => void> = {
        m: () => open({ kind: 'change', contactId: contact.id, focus: 'channel' }),
        t: () => open({ kind: 'change', contactId: contact.id, focus: 'times' }),
        l: () =>
          apply(
            [{ op: 'change', contactId: contact.id, locked: !contact.locked }],
            `${contact.satelliteName} ${contact.locked ? 'unlocked' : 'locked'}.`,
          ),
        delete: () => {
          selectContact(null);
          apply(
            [{ op: 'remove', contactId: contact.id }],
            `${contactName(contact)} taken off the plan.`,
          );
        },
      };
      const run = act[event.key.toLowerCase()];
      if (!run) return;
      event.preventDefault();
      run();
    },
    [legs, groups, allows, open, apply, selectContact],
  );
}
