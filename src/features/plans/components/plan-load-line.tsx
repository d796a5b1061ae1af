import { useMemo } from 'react';
import { LoadLine } from '../../../charts/load-line.tsx';
import type { LoadChannel } from '../../../charts/load-side.tsx';
import { useNow } from '../../../hooks/use-now.ts';
import { useSize } from '../../../hooks/use-size.ts';
import { usePlanDesk } from '../hooks/plan-desk.ts';
import { usePlanView } from '../hooks/plan-view.ts';
import { contactMission } from '../model/plan-legs.ts';

/** The one time axis of the page: a stretch for the calendar, an instant for sky and map. */
export function PlanLoadLine({
  mode,
  height = 104,
}: {
  mode: 'stretch' | 'instant';
  height?: number;
}) {
  const { legs, groups, span, missions } = usePlanDesk();
  const { stretch, setStretch, instantMs, setInstant } = usePlanView();
  const [ref, { width }] = useSize();
  const now = useNow(10_000);
  const load = useMemo(
    () => legs.map((leg) => ({ ...leg, series: missions.series(contactMission(leg.contact)) })),
    [legs, missions],
  );
  const channels = useMemo(
    (): LoadChannel[] =>
      groups.flatMap(({ columns, direction }) =>
        columns.map(({ closed }) => ({ direction, closed })),
      ),
    [groups],
  );
  return (
    <div ref={ref} className="min-w-0">
      {width > 300 && (
        <LoadLine
          span={span}
          legs={load}
          channels={channels}
          width={width}
          height={height}
          nowMs={now}
          {...(mode === 'stretch'
            ? { brush: stretch, onBrush: setStretch }
            : { instantMs, onInstant: setInstant })}
        />
      )}
    </div>
  );
}
