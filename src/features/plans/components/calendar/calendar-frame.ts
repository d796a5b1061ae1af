import { createContext, use } from 'react';
import type { Interval } from '../../../../../shared/time.ts';
import type { CalendarItem, CalendarLayout } from '../../model/calendar-layout.ts';
import type { Ghost } from '../../model/ghosts.ts';
import type { LegDrag } from '../../hooks/use-leg-drag.ts';

/** Width of the hours at the left, px. */
export const GUTTER = 62;

/** Geometry of the calendar, for the parts that react-big-calendar places. */
export interface CalendarFrame {
  stretch: Interval;
  pxPerMinute: number;
  height: number;
  layout: CalendarLayout;
  itemOf: (id: string) => CalendarItem | undefined;
  ghosts: readonly Ghost[];
  unfold: (channelId: string) => void;
  drag: LegDrag | null;
  beginDrag: (event: React.PointerEvent, legId: string) => void;
  /** The leg that takes the tab stop. */
  tabLegId: string | null;
  nowMs: number | null;
}

export const CalendarFrameContext = createContext<CalendarFrame | null>(null);

export function useCalendarFrame(): CalendarFrame {
  const frame = use(CalendarFrameContext);
  if (!frame) throw new Error('A part of the calendar stands outside it');
  return frame;
}

/** Distance of an instant from the top of the calendar, px. */
export const topOf = (frame: Pick<CalendarFrame, 'stretch' | 'pxPerMinute'>, ms: number): number =>
  ((ms - frame.stretch.fromMs) / 60_000) * frame.pxPerMinute;
