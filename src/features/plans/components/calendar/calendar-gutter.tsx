import { useMemo } from 'react';
import { MINUTE_MS } from '../../../../../shared/time.ts';
import { countLoad } from '../../../../charts/load-counts.ts';
import { clockMinutes } from '../../../../lib/format-time.ts';
import { usePlanDesk } from '../../hooks/plan-desk.ts';
import { ruleSteps } from '../../model/calendar-layout.ts';
import { GUTTER, topOf, useCalendarFrame } from './calendar-frame.ts';

const RAIL = 14;

/** Hours, the rules across all columns, and the load of the stretch as a narrow rail. */
export function CalendarGutter() {
  const frame = useCalendarFrame();
  const { stretch, pxPerMinute, height, layout, nowMs } = frame;
  const { rule, label } = ruleSteps(pxPerMinute);
  const rules: number[] = [];
  const step = rule * MINUTE_MS;
  for (let ms = Math.ceil(stretch.fromMs / step) * step; ms < stretch.toMs; ms += step)
    rules.push(ms);
  return (
    <div className="figures relative shrink-0" style={{ width: GUTTER, height }}>
      {rules.map((ms, index) => {
        const minutes = ms / MINUTE_MS;
        const strong = minutes % (rule === 5 ? 15 : 60) === 0;
        const isHour = minutes % 60 === 0;
        const top = topOf(frame, ms);
        return (
          <div key={ms}>
            <span
              aria-hidden="true"
              className={strong ? 'absolute h-px bg-line' : 'absolute h-px bg-line-soft'}
              style={{ left: GUTTER - 4, width: layout.width + 4, top }}
            />
            {minutes % label === 0 && top > 7 && (
              <span
                className={`absolute right-6 text-caption whitespace-nowrap ${isHour || index === 0 ? 'font-semibold' : 'text-ink-muted'}`}
                style={{ top: top - 8 }}
              >
                {isHour || index === 0 ? clockMinutes(ms) : `:${clockMinutes(ms).slice(3)}`}
              </span>
            )}
          </div>
        );
      })}
      <LoadRail />
      {nowMs !== null && nowMs > stretch.fromMs && nowMs < stretch.toMs && (
        <span
          aria-hidden="true"
          className="absolute z-10 h-0.5 bg-danger-mark"
          style={{ left: GUTTER - 22, width: layout.width + 22, top: topOf(frame, nowMs) }}
        />
      )}
    </div>
  );
}

function LoadRail() {
  const frame = useCalendarFrame();
  const { legs, columns } = usePlanDesk();
  const { stretch, pxPerMinute, height } = frame;
  const d = useMemo(() => {
    const span = { fromMs: stretch.fromMs, toMs: stretch.toMs };
    const { total } = countLoad(
      legs.map((leg) => ({ ...leg, series: null })),
      'receive',
      span,
    );
    const channels = [...columns.values()].filter(
      ({ channel }) => channel.direction === 'receive',
    ).length;
    let path = '';
    for (const [minute, count] of total.entries())
      if (count > 0)
        path += `M0 ${(minute * pxPerMinute).toFixed(1)}h${((count / Math.max(1, channels)) * RAIL).toFixed(1)}v${pxPerMinute.toFixed(2)}H0Z`;
    return path;
  }, [legs, columns, stretch.fromMs, stretch.toMs, pxPerMinute]);
  return (
    <svg
      aria-hidden="true"
      width={RAIL + 2}
      height={height}
      className="absolute top-0"
      style={{ left: GUTTER - RAIL - 6 }}
    >
      <path d={d} fill="var(--ink-faint)" opacity="0.65" />
      <path d={`M0.5 0V${height}`} stroke="var(--ink-faint)" />
    </svg>
  );
}
