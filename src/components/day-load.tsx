import { useQuery } from '@tanstack/react-query';
import { useMemo } from 'react';
import { isHidden, type Plan } from '../../shared/schemas/plan.ts';
import { dayInterval } from '../../shared/time.ts';
import { LoadLine } from '../charts/load-line.tsx';
import type { LoadLeg } from '../charts/load-counts.ts';
import { useMissions } from '../hooks/use-missions.ts';
import { useSize } from '../hooks/use-size.ts';
import { closedSpans } from '../lib/closures.ts';
import { stationQueries } from '../queries/station-queries.ts';

/** The load line of a plan, to look at: beams in use against open channels over its day. */
export function DayLoad({ plan, nowMs }: { plan: Plan; nowMs: number }) {
  const missions = useMissions();
  const [ref, { width }] = useSize();
  const channels = useQuery(stationQueries.channels(plan.stationId)).data;
  const closures = useQuery(stationQueries.closures(plan.stationId)).data;
  const span = useMemo(() => dayInterval(plan.day), [plan.day]);
  const legs = useMemo(
    () =>
      plan.contacts.flatMap((contact): LoadLeg[] => {
        const series = isHidden(contact) ? null : missions.series(contact.missionId);
        return (['receive', 'transmit'] as const).flatMap((direction) => {
          const leg = contact[direction];
          return leg
            ? [{ direction, series, fromMs: Date.parse(leg.fromUtc), toMs: Date.parse(leg.toUtc) }]
            : [];
        });
      }),
    [plan.contacts, missions],
  );
  const open = useMemo(
    () =>
      (channels ?? [])
        .filter(({ inService }) => inService)
        .map((channel) => ({
          direction: channel.direction,
          closed: closedSpans(channel, closures ?? [], span),
        })),
    [channels, closures, span],
  );
  return (
    <div ref={ref} className="min-h-26 min-w-0">
      {width > 300 && channels && (
        <LoadLine span={span} legs={legs} channels={open} width={width} nowMs={nowMs} />
      )}
    </div>
  );
}
