import './plan-calendar.css';
import { useCallback, useMemo, useRef, useState } from 'react';
import { MINUTE_MS } from '../../../../../shared/time.ts';
import { useNow } from '../../../../hooks/use-now.ts';
import { useSize } from '../../../../hooks/use-size.ts';
import { clockMinutes } from '../../../../lib/format-time.ts';
import { usePlanDesk } from '../../hooks/plan-desk.ts';
import { usePlanView } from '../../hooks/plan-view.ts';
import { useLegDrag } from '../../hooks/use-leg-drag.ts';
import { layoutCalendar, touches } from '../../model/calendar-layout.ts';
import type { PlanColumn } from '../../model/columns.ts';
import { ghostsIn } from '../../model/ghosts.ts';
import { BigCalendar } from './big-calendar.tsx';
import { CalendarFoot } from './calendar-foot.tsx';
import { CalendarFrameContext, GUTTER, type CalendarFrame } from './calendar-frame.ts';
import { CalendarHead } from './calendar-head.tsx';
import { useCalendarKeys } from './use-calendar-keys.ts';

/** A contact of five minutes keeps its name. */
const LEAST_PX_PER_MINUTE = 3.2;
const HEAD_AND_FOOT = 48 + 30;
const MARGIN = 14;

const closedWords = ({ channel, closed }: PlanColumn): string => {
  const span = closed[0];
  if (!span) return channel.label;
  const until = span.untilFurtherNotice
    ? 'until further notice'
    : `until ${clockMinutes(span.toMs)}`;
  return `Closed ${until}, ${span.reason}`;
};

/** The chosen stretch of the day, time running down, one column a beam channel. */
export function PlanCalendar() {
  const desk = usePlanDesk();
  const { stretch, contactId } = usePlanView();
  const [sizeRef, size] = useSize();
  const box = useRef<HTMLDivElement | null>(null);
  const [unfolded, setUnfolded] = useState<ReadonlySet<string>>(new Set());
  const now = useNow(5000);

  const ghosts = useMemo(() => ghostsIn(desk, stretch), [desk, stretch]);
  const visible = useMemo(
    () => desk.legs.filter((leg) => touches(leg, stretch)),
    [desk.legs, stretch],
  );
  const layout = useMemo(() => {
    const occupied = new Set([...visible, ...ghosts].map(({ channelId }) => channelId));
    const width = Math.max(240, size.width - GUTTER - MARGIN);
    return layoutCalendar({ groups: desk.groups, stretch, occupied, unfolded, width, closedWords });
  }, [desk.groups, stretch, visible, ghosts, unfolded, size.width]);

  const minutes = (stretch.toMs - stretch.fromMs) / MINUTE_MS;
  const pxPerMinute = Math.max(LEAST_PX_PER_MINUTE, (size.height - HEAD_AND_FOOT) / minutes);
  const leftPx = useCallback(
    () =>
      (box.current?.getBoundingClientRect().left ?? 0) + GUTTER - (box.current?.scrollLeft ?? 0),
    [],
  );
  const { drag, begin } = useLegDrag({ pxPerMinute, items: layout.items, leftPx });
  const tabLegId = visible.find((leg) => leg.contactId === contactId)?.id ?? visible[0]?.id ?? null;
  const items = useMemo(() => new Map(layout.items.map((item) => [item.id, item])), [layout]);
  const frame: CalendarFrame = {
    stretch,
    pxPerMinute,
    height: pxPerMinute * minutes,
    layout,
    itemOf: (id) => items.get(id),
    ghosts,
    unfold: (id) => setUnfolded((before) => new Set([...before, id])),
    drag,
    beginDrag: begin,
    tabLegId,
    nowMs: now >= desk.span.fromMs && now < desk.span.toMs ? now : null,
  };
  const keys = useCalendarKeys(visible);
  return (
    <div
      ref={(element) => {
        box.current = element;
        return sizeRef(element);
      }}
      className="plan-calendar flex h-full min-h-0 min-w-0 flex-1 flex-col overflow-x-auto overflow-y-hidden bg-sheet"
    >
      {size.width > 0 && (
        <CalendarFrameContext value={frame}>
          <CalendarHead />
          <div
            role="group"
            aria-label="Calendar of beam channels; arrows walk from contact to contact"
            className="flex min-h-0 flex-1 flex-col"
            style={{ width: Math.max(size.width, GUTTER + layout.width) }}
            onKeyDown={keys}
          >
            <BigCalendar legs={visible} layout={layout} stretch={stretch} />
          </div>
          <CalendarFoot />
        </CalendarFrameContext>
      )}
    </div>
  );
}
