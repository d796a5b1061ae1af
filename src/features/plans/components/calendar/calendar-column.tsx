import type { ReactNode, Ref } from 'react';
import { classNames } from '../../../../lib/class-names.ts';
import { clockMinutes } from '../../../../lib/format-time.ts';
import { intersect, type Interval } from '../../../../../shared/time.ts';
import { seriesColor } from '../../../../lib/series.ts';
import { usePlanDesk } from '../../hooks/plan-desk.ts';
import { usePlanEdits } from '../../hooks/plan-edits.ts';
import { usePlanView } from '../../hooks/plan-view.ts';
import type { CalendarItem } from '../../model/calendar-layout.ts';
import { lookOfPass } from '../../model/reasons.ts';
import { PASS_DRAG_TYPE } from '../../model/pass-drag.ts';
import { GUTTER, topOf, useCalendarFrame } from './calendar-frame.ts';

interface Props {
  resource?: string;
  children?: ReactNode;
  className?: string;
  ref?: Ref<HTMLDivElement>;
}

/** The column that react-big-calendar fills, with what lies under the contacts: closures, open passes, limits of a drag. */
export function CalendarColumn({ resource = '', children, className, ref }: Props) {
  const frame = useCalendarFrame();
  const { allows } = usePlanDesk();
  const { open } = usePlanEdits();
  const item = frame.itemOf(resource);
  if (!item) return null;
  if (item.kind === 'rail') return <Rail item={item} />;
  const takesPasses = allows('edit') && item.columns[0]?.channel.direction === 'receive';
  return (
    <div
      ref={ref}
      className={className}
      style={{ width: item.width, height: frame.height, left: GUTTER + item.x }}
      onDragOver={(event) => {
        if (takesPasses && event.dataTransfer.types.includes(PASS_DRAG_TYPE))
          event.preventDefault();
      }}
      onDrop={(event) => {
        const passId = event.dataTransfer.getData(PASS_DRAG_TYPE);
        if (passId) open({ kind: 'assign', passId, channelId: item.id });
      }}
    >
      <ClosedSpans item={item} />
      <DragLimits item={item} />
      {frame.ghosts
        .filter((ghost) => ghost.channelId === item.id)
        .map((ghost) => (
          <GhostBlock key={ghost.pass.passId} ghost={ghost} />
        ))}
      {children}
      <DraggedLeg item={item} />
    </div>
  );
}

function Rail({ item }: { item: CalendarItem }) {
  const frame = useCalendarFrame();
  return (
    <div
      className="absolute top-0"
      style={{ width: item.width, height: frame.height, left: GUTTER + item.x }}
    >
      <button
        type="button"
        onClick={() => frame.unfold(item.id)}
        aria-label={`${item.words}. Unfold`}
        className={classNames(
          'absolute inset-x-0.5 inset-y-0 overflow-hidden text-caption text-ink-muted hover:text-ink',
          item.isClosed ? 'hatched' : 'border-x border-dotted border-line bg-raised',
        )}
      >
        <span
          aria-hidden="true"
          className={classNames(
            'sticky top-3 block py-1 whitespace-nowrap [writing-mode:vertical-rl]',
            item.isClosed && 'bg-shade',
          )}
        >
          {item.words}
        </span>
      </button>
    </div>
  );
}

function ClosedSpans({ item }: { item: CalendarItem }) {
  const frame = useCalendarFrame();
  const column = item.columns[0];
  return (
    <>
      {column?.closed.map((closed) => {
        const shown = intersect(closed, frame.stretch);
        if (!shown) return null;
        return (
          <div
            key={closed.id}
            className="hatched absolute inset-x-0.5 text-caption text-ink-muted"
            style={boxOf(frame, shown)}
          >
            <span className="mx-auto mt-2 block w-4.5 bg-shade py-1 whitespace-nowrap [writing-mode:vertical-rl]">
              {closed.untilFurtherNotice
                ? 'Closed until further notice'
                : `Closed until ${clockMinutes(closed.toMs)}`}
              , {closed.reason}
            </span>
          </div>
        );
      })}
    </>
  );
}

const boxOf = (frame: ReturnType<typeof useCalendarFrame>, { fromMs, toMs }: Interval) => ({
  top: topOf(frame, fromMs),
  height: topOf(frame, toMs) - topOf(frame, fromMs),
});

/** While a leg is dragged: where its own windows let it lie. */
function DragLimits({ item }: { item: CalendarItem }) {
  const frame = useCalendarFrame();
  const { drag } = frame;
  if (!drag || item.columns[0]?.channel.direction !== drag.leg.direction) return null;
  return (
    <>
      {drag.allowed.map((allowed) => {
        const shown = intersect(allowed, frame.stretch);
        return (
          shown && (
            <div
              key={allowed.fromMs}
              className="absolute inset-x-0 border-y border-dashed border-accent bg-accent/8"
              style={boxOf(frame, shown)}
            />
          )
        );
      })}
    </>
  );
}

function DraggedLeg({ item }: { item: CalendarItem }) {
  const frame = useCalendarFrame();
  const { drag } = frame;
  if (drag?.channelId !== item.id) return null;
  return (
    <div
      className="pointer-events-none absolute inset-x-0.5 z-20 rounded-mark border-2 border-accent bg-accent/15"
      style={boxOf(frame, drag)}
    >
      {drag.grip !== 'body' && (
        <span
          className="figures absolute left-1 rounded-mark bg-surface px-1 text-caption font-semibold shadow-float"
          style={drag.grip === 'from' ? { top: -9 } : { bottom: -9 }}
        >
          {clockOf(drag.grip === 'from' ? drag.fromMs : drag.toMs)}
        </span>
      )}
    </div>
  );
}
const clockOf = (ms: number): string => new Date(ms).toISOString().slice(11, 19);

/** A pass left open, in the column it would take: a dashed outline, its name, the reason in two words. */
function GhostBlock({ ghost }: { ghost: ReturnType<typeof useCalendarFrame>['ghosts'][number] }) {
  const frame = useCalendarFrame();
  const { missions } = usePlanDesk();
  const { passId, selectPass } = usePlanView();
  const series = missions.series(ghost.pass.missionId);
  const color = series === null ? 'var(--ink-faint)' : seriesColor(series);
  const box = boxOf(frame, ghost);
  const selected = passId === ghost.pass.passId;
  const look = lookOfPass(ghost.pass);
  return (
    <button
      type="button"
      tabIndex={-1}
      aria-pressed={selected}
      aria-label={`${ghost.pass.satelliteName}, not on the plan: ${look.word}`}
      onClick={() => selectPass(selected ? null : ghost.pass.passId)}
      className="absolute right-[3px] left-0.5 overflow-hidden rounded-mark border-[1.5px] border-dashed bg-surface px-1.5 text-left text-caption leading-[14px] text-ink-muted"
      style={{
        ...box,
        borderColor: color,
        ...(selected ? { boxShadow: '0 0 0 2px var(--surface), 0 0 0 4.25px var(--accent)' } : {}),
      }}
    >
      {box.height >= 14 && <span className="block truncate">{ghost.pass.satelliteName}</span>}
      {box.height >= 32 && (
        <span
          className={classNames(
            'block truncate font-semibold',
            ghost.pass.standing === 'free' ? 'text-info-text' : 'text-warn-text',
          )}
        >
          {look.short}
        </span>
      )}
    </button>
  );
}
