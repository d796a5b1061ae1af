import { countLoad } from '../../../../charts/load-counts.ts';
import { classNames } from '../../../../lib/class-names.ts';
import { usePlanDesk } from '../../hooks/plan-desk.ts';
import type { GroupSpan } from '../../model/calendar-layout.ts';
import { GUTTER, useCalendarFrame } from './calendar-frame.ts';

/** Heads of groups and columns; a group says how many of its open channels the busiest visible minute takes. */
export function CalendarHead() {
  const { layout } = useCalendarFrame();
  return (
    <div
      aria-hidden="true"
      className="relative h-12 shrink-0"
      style={{ width: GUTTER + layout.width }}
    >
      <span className="absolute bottom-1 text-caption text-ink-muted" style={{ left: GUTTER - 26 }}>
        load
      </span>
      {layout.groups.map((span) => (
        <GroupHead key={span.group.key} span={span} />
      ))}
      {layout.items.map((item) => (
        <span
          key={item.id}
          className={classNames(
            'absolute bottom-1 truncate text-center text-caption',
            item.kind === 'rail' ? 'text-ink-muted' : 'font-semibold',
          )}
          style={{ left: GUTTER + item.x, width: item.width }}
        >
          {item.label}
        </span>
      ))}
    </div>
  );
}

function GroupHead({ span }: { span: GroupSpan }) {
  const { stretch } = useCalendarFrame();
  const { legs } = usePlanDesk();
  const { group } = span;
  const own = new Set(group.columns.map(({ id }) => id));
  const { most } = countLoad(
    legs.filter(({ channelId }) => own.has(channelId)).map((leg) => ({ ...leg, series: null })),
    group.direction,
    stretch,
  );
  const open = group.columns.filter(
    ({ closed }) =>
      !closed.some(({ fromMs, toMs }) => fromMs <= stretch.fromMs && toMs >= stretch.toMs),
  ).length;
  return (
    <span
      className="absolute top-1.5 truncate border-b border-line-strong pb-0.5 text-caption"
      style={{ left: GUTTER + span.x + 2, width: span.width - 4 }}
    >
      <strong className="font-semibold">{group.title}</strong>{' '}
      <span className="text-ink-muted">
        {most} of {open}
        {span.width > 210 && ' at most'}
      </span>
    </span>
  );
}
