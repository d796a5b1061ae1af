import { DateTime, Settings } from 'luxon';
import { memo, useMemo, type ComponentType } from 'react';
import { Calendar, luxonLocalizer, type CalendarProps } from 'react-big-calendar';
import type { Interval } from '../../../../../shared/time.ts';
import { MINUTE_MS } from '../../../../../shared/time.ts';
import type { CalendarLayout } from '../../model/calendar-layout.ts';
import { contactName, type PlanLeg } from '../../model/plan-legs.ts';
import { CalendarColumn } from './calendar-column.tsx';
import { CalendarGutter } from './calendar-gutter.tsx';
import { ContactBlock } from './contact-block.tsx';

// The product's clock is UTC, whatever the machine's zone.
Settings.defaultZone = 'utc';
const localizer = luxonLocalizer(DateTime);

interface LegEvent {
  id: string;
  start: Date;
  end: Date;
  resourceId: string;
  leg: PlanLeg;
}
interface ColumnResource {
  id: string;
  title: string;
}

/** Our block takes the place of the library's: it is a button and stands at the exact second. */
const Block = ({ event }: { event: LegEvent }) => <ContactBlock leg={event.leg} />;

const NEVER = new Date(0);

/** Legs of one channel never overlap: each takes the whole column (the block places itself by its instants). */
const oneBelowTheOther = ({ events }: { events: LegEvent[] }) =>
  events.map((event) => ({ event, style: { top: 0, height: 0, width: 100, xOffset: 0 } }));

// The type of the library knows neither the props it hands to wrappers nor a layout given as a function.
const COMPONENTS = {
  eventWrapper: Block,
  dayColumnWrapper: CalendarColumn,
  timeGutterWrapper: CalendarGutter,
} as unknown as NonNullable<CalendarProps<LegEvent, ColumnResource>['components']>;
const LAYOUT = oneBelowTheOther as unknown as 'no-overlap';
const Base = Calendar as ComponentType<CalendarProps<LegEvent, ColumnResource>>;

interface Props {
  legs: readonly PlanLeg[];
  layout: CalendarLayout;
  stretch: Interval;
}

/** react-big-calendar's day view with one resource column per beam channel. */
export const BigCalendar = memo(function BigCalendar({ legs, layout, stretch }: Props) {
  const events = useMemo(
    () =>
      legs.map((leg) => ({
        id: leg.id,
        start: new Date(leg.fromMs),
        end: new Date(leg.toMs),
        resourceId: leg.channelId,
        leg,
      })),
    [legs],
  );
  const resources = useMemo(
    () => layout.items.map(({ id, label }) => ({ id, title: label })),
    [layout],
  );
  const [min, max] = useMemo(
    () => [new Date(stretch.fromMs), new Date(stretch.toMs - MINUTE_MS / 2)],
    [stretch.fromMs, stretch.toMs],
  );
  return (
    <Base
      localizer={localizer}
      view="day"
      views={['day']}
      onView={() => undefined}
      onNavigate={() => undefined}
      toolbar={false}
      date={min}
      getNow={() => NEVER}
      min={min}
      max={max}
      step={24 * 60}
      timeslots={1}
      events={events}
      titleAccessor={(event) => contactName(event.leg.contact)}
      resources={resources}
      resourceIdAccessor="id"
      resourceTitleAccessor="title"
      components={COMPONENTS}
      dayLayoutAlgorithm={LAYOUT}
      showMultiDayTimes
      enableAutoScroll={false}
      selectable={false}
    />
  );
});
