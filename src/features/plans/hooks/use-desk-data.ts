import { useQuery } from '@tanstack/react-query';
import { useMemo } from 'react';
import type { Plan, PlanAction } from '../../../../shared/schemas/plan.ts';
import type { Station } from '../../../../shared/schemas/station.ts';
import { dayInterval, toIso } from '../../../../shared/time.ts';
import { useMissions } from '../../../hooks/use-missions.ts';
import { useSkyGround } from '../../../hooks/use-sky-ground.ts';
import { passQueries } from '../../../queries/pass-queries.ts';
import { planQueries } from '../../../queries/plan-queries.ts';
import { satelliteQueries } from '../../../queries/satellite-queries.ts';
import { stationQueries } from '../../../queries/station-queries.ts';
import { columnGroups } from '../model/columns.ts';
import { planLegs } from '../model/plan-legs.ts';
import type { PlanDesk } from './plan-desk.ts';

const byId = <T extends { id: string }>(items: readonly T[] | undefined): ReadonlyMap<string, T> =>
  new Map((items ?? []).map((item) => [item.id, item]));

/** Gathers the desk of a plan; null until what every view needs is there. */
export function useDeskData(plan: Plan, station: Station | null): PlanDesk | null {
  const stationId = plan.stationId;
  const span = useMemo(() => dayInterval(plan.day), [plan.day]);
  const faces = useQuery(stationQueries.faces(stationId)).data;
  const channels = useQuery(stationQueries.channels(stationId)).data;
  const closures = useQuery(stationQueries.closures(stationId)).data;
  const satellites = useQuery(satelliteQueries.list()).data;
  const openPasses = useQuery(planQueries.openPasses(plan.id, plan.version)).data;
  const facts = useQuery(planQueries.facts(plan.id, plan.version)).data;
  const logs = useQuery({ ...planQueries.logs(plan.id), enabled: plan.state === 'released' }).data;
  const passes = useQuery(
    passQueries.list({ stationId, fromUtc: toIso(span.fromMs), toUtc: toIso(span.toMs) }),
  ).data;
  const missions = useMissions();
  const ground = useSkyGround(stationId, plan.limitOfDayDb);
  return useMemo(() => {
    if (!station || !faces || !channels) return null;
    const groups = columnGroups({ channels, faces, closures: closures ?? [] }, span);
    const labels = new Map(channels.map(({ id, label }) => [id, label]));
    return {
      plan,
      station,
      span,
      faces,
      channels,
      closures: closures ?? [],
      groups,
      columns: byId(groups.flatMap(({ columns }) => columns)),
      legs: planLegs(plan.contacts),
      contacts: byId(plan.contacts),
      passes: byId(passes),
      satellites: byId(satellites),
      openPasses: openPasses ?? null,
      facts: facts ?? null,
      logs: new Map((logs ?? []).map((log) => [log.contactId, log])),
      missions,
      ground,
      allows: (action: PlanAction) => plan.allowedActions.includes(action),
      labelOf: (channelId) => (channelId && labels.get(channelId)) ?? '–',
    };
  }, [
    plan,
    station,
    span,
    faces,
    channels,
    closures,
    satellites,
    openPasses,
    facts,
    logs,
    passes,
    missions,
    ground,
  ]);
}
