import { useQuery } from '@tanstack/react-query';
import { useParams } from 'react-router-dom';
import { PageHead } from '../../components/page-head.tsx';
import { QueryView } from '../../components/query-view.tsx';
import { PlanPage } from '../../features/plans/components/plan-page.tsx';
import { useTitle } from '../../hooks/use-title.ts';
import { shortDay } from '../../lib/format-time.ts';
import { planQueries } from '../../queries/plan-queries.ts';
import { stationQueries } from '../../queries/station-queries.ts';

export function Component() {
  const { id = '' } = useParams();
  const plan = useQuery(planQueries.one(id));
  const stations = useQuery(stationQueries.list());
  useTitle(plan.data ? `Plan of ${shortDay(plan.data.day)}` : 'Day plan');
  const station = stations.data?.find((one) => one.id === plan.data?.stationId) ?? null;
  return (
    <>
      {!plan.data && <PageHead title="Day plan" />}
      <QueryView query={plan} what="This plan">
        {(data) => <PlanPage key={data.id} plan={data} station={station} />}
      </QueryView>
    </>
  );
}
