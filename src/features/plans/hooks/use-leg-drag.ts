import { useCallback, useEffect, useRef, useState } from 'react';
import type { Edit } from '../../../../shared/schemas/edit.ts';
import { toIso, type Interval } from '../../../../shared/time.ts';
import type { CalendarItem } from '../model/calendar-layout.ts';
import type { PlanLeg } from '../model/plan-legs.ts';
import { usePlanDesk } from './plan-desk.ts';
import { usePlanEdits } from './plan-edits.ts';

/** A leg on its way: to another channel, or with one end at another time. */
export interface LegDrag extends Interval {
  leg: PlanLeg;
  grip: 'body' | 'from' | 'to';
  channelId: string;
  /** Where the leg may lie by its own windows; drawn while it is dragged. */
  allowed: readonly Interval[];
}

const EDGE_PX = 5;
const STEP_MS = 1000;

interface Screen {
  pxPerMinute: number;
  items: readonly CalendarItem[];
  /** Left edge of the first column on screen. */
  leftPx: () => number;
}

/** Drag with the pointer: the body to another channel, an end to trim. The server decides on the drop. */
export function useLegDrag(screen: Screen): {
  drag: LegDrag | null;
  begin: (event: React.PointerEvent, legId: string) => void;
} {
  const { legs, passes, allows, columns, labelOf } = usePlanDesk();
  const { apply } = usePlanEdits();
  const [drag, setDrag] = useState<LegDrag | null>(null);
  const start = useRef<{ x: number; y: number; leg: PlanLeg; grip: LegDrag['grip'] } | null>(null);
  const latest = useRef({ screen, apply });
  useEffect(() => {
    latest.current = { screen, apply };
  });

  const begin = useCallback(
    (event: React.PointerEvent, legId: string) => {
      const leg = legs.find(({ id }) => id === legId);
      if (!leg || !allows('edit') || event.button !== 0 || 'hidden' in leg.contact) return;
      const box = event.currentTarget.getBoundingClientRect();
      const y = event.clientY - box.top;
      const roomy = box.height > 3 * EDGE_PX;
      const grip =
        roomy && y < EDGE_PX ? 'from' : roomy && box.height - y < EDGE_PX ? 'to' : 'body';
      start.current = { x: event.clientX, y: event.clientY, leg, grip };
    },
    [legs, allows],
  );

  useEffect(() => {
    const windowsOf = (leg: PlanLeg): Interval[] => {
      if ('hidden' in leg.contact) return [];
      const face = leg.contact.faceId;
      return (passes.get(leg.contact.passId)?.windows ?? [])
        .filter((window) => window.direction === leg.direction && window.faceId === face)
        .map(({ fromUtc, toUtc }) => ({ fromMs: Date.parse(fromUtc), toMs: Date.parse(toUtc) }));
    };
    const move = (event: PointerEvent): void => {
      const from = start.current;
      if (!from) return;
      const [dx, dy] = [event.clientX - from.x, event.clientY - from.y];
      if (Math.hypot(dx, dy) < 4) return;
      const { leg, grip } = from;
      const allowed = windowsOf(leg);
      if (grip === 'body') {
        const channelId = channelUnder(event.clientX, leg, latest.current.screen, columns);
        return setDrag({ leg, grip, channelId, allowed, fromMs: leg.fromMs, toMs: leg.toMs });
      }
      setDrag({
        ...trimmed(leg, grip, dy / latest.current.screen.pxPerMinute, allowed),
        leg,
        grip,
        channelId: leg.channelId,
        allowed,
      });
    };
    const up = (): void => {
      start.current = null;
      setDrag((now) => {
        if (now) queueMicrotask(() => drop(now));
        return null;
      });
    };
    const drop = (now: LegDrag): void => {
      const edit = editOf(now);
      if (!edit || 'hidden' in now.leg.contact) return;
      const name = now.leg.contact.satelliteName;
      const words =
        now.grip === 'body' ? `${name} moved to ${labelOf(now.channelId)}.` : `${name} trimmed.`;
      latest.current.apply([edit], words);
    };
    const cancel = (event: KeyboardEvent): void => {
      if (event.key !== 'Escape' || !start.current) return;
      start.current = null;
      setDrag(null);
    };
    window.addEventListener('pointermove', move);
    window.addEventListener('pointerup', up);
    window.addEventListener('pointercancel', up);
    window.addEventListener('keydown', cancel);
    return () => {
      window.removeEventListener('pointermove', move);
      window.removeEventListener('pointerup', up);
      window.removeEventListener('pointercancel', up);
      window.removeEventListener('keydown', cancel);
    };
  }, [passes, columns, labelOf]);
  return { drag, begin };
}

function channelUnder(
  clientX: number,
  leg: PlanLeg,
  screen: Screen,
  columns: ReadonlyMap<string, { channel: { direction: string } }>,
): string {
  const x = clientX - screen.leftPx();
  const item = screen.items.find((one) => one.x <= x && x < one.x + one.width);
  if (item?.kind !== 'column') return leg.channelId;
  return columns.get(item.id)?.channel.direction === leg.direction ? item.id : leg.channelId;
}

/** An end follows the pointer inside the window that holds the leg; one second is the step. */
function trimmed(
  leg: PlanLeg,
  grip: 'from' | 'to',
  byMinutes: number,
  allowed: readonly Interval[],
): Interval {
  const holds = allowed.find((one) => one.fromMs < leg.toMs && leg.fromMs < one.toMs);
  const low = Math.ceil((holds?.fromMs ?? leg.fromMs) / STEP_MS) * STEP_MS;
  const high = Math.floor((holds?.toMs ?? leg.toMs) / STEP_MS) * STEP_MS;
  const by = Math.round((byMinutes * 60_000) / STEP_MS) * STEP_MS;
  const clamp = (ms: number, least: number, most: number): number =>
    Math.max(least, Math.min(most, ms));
  return grip === 'from'
    ? { fromMs: clamp(leg.fromMs + by, low, leg.toMs - 10_000), toMs: leg.toMs }
    : { fromMs: leg.fromMs, toMs: clamp(leg.toMs + by, leg.fromMs + 10_000, high) };
}

function editOf({ leg, grip, channelId, fromMs, toMs }: LegDrag): Edit | null {
  const change = { op: 'change' as const, contactId: leg.contactId };
  if (grip === 'body')
    return channelId === leg.channelId ? null : { ...change, [leg.direction]: { channelId } };
  if (fromMs === leg.fromMs && toMs === leg.toMs) return null;
  const times = { fromUtc: toIso(fromMs), toUtc: toIso(toMs) };
  if (leg.direction === 'transmit') return { ...change, transmit: times };
  const uplink = leg.contact.transmit;
  if (!uplink) return { ...change, receive: times };
  // The uplink stays inside its receive leg.
  const inside = {
    fromUtc: toIso(Math.max(fromMs, Date.parse(uplink.fromUtc))),
    toUtc: toIso(Math.min(toMs, Date.parse(uplink.toUtc))),
  };
  return { ...change, receive: times, transmit: inside };
}
