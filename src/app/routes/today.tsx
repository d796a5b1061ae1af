import { useQuery } from '@tanstack/react-query';
import type { PlanSummary } from '../../../shared/schemas/plan.ts';
import { dayOf, MINUTE_MS } from '../../../shared/time.ts';
import { PageBody, PageHead } from '../../components/page-head.tsx';
import { QueryView } from '../../components/query-view.tsx';
import { TodayCards } from '../../features/today/components/today-cards.tsx';
import { DaysAhead } from '../../features/today/components/days-ahead.tsx';
import { RunningDay } from '../../features/today/components/running-day.tsx';
import { planOfRecord } from '../../features/today/plan-of-record.ts';
import { todayTasks } from '../../features/today/today-tasks.ts';
import { useNow } from '../../hooks/use-now.ts';
import { roleWords, useMay, useUser } from '../../hooks/use-session.ts';
import { useStation } from '../../hooks/use-station.ts';
import { useTitle } from '../../hooks/use-title.ts';
import { longDay, nextDay } from '../../lib/format-time.ts';
import { elementSetQueries } from '../../queries/element-set-queries.ts';
import { planQueries } from '../../queries/plan-queries.ts';

export function Component() {
  useTitle('Today');
  const user = useUser();
  const { station } = useStation();
  const { may, mayEver } = useMay();
  const now = useNow(MINUTE_MS);
  const today = dayOf(now);
  const plans = useQuery({
    ...planQueries.list({
      stationId: station?.id ?? '',
      fromDay: today,
      toDay: nextDay(today, 3),
    }),
    enabled: station !== null,
  });
  const sets = useQuery(elementSetQueries.list({ state: 'in-use' }));
  return (
    <>
      <PageHead
        title="Today"
        aside={user && `${longDay(today)}, ${roleWords(user.roles).toLowerCase()}`}
      />
      <PageBody>
        <QueryView query={plans} what="What waits for you">
          {(list) => (
            <>
              <div className="grid items-start gap-3.5 drawer:grid-cols-[minmax(0,1fr)_24rem]">
                <TodayCards
                  tasks={todayTasks({
                    today,
                    now,
                    plans: list,
                    sets: sets.data ?? [],
                    station,
                    isScheduler: may('create.plans'),
                    isCrew: may('edit.satellites'),
                    isLead: mayEver('plan.sign'),
                  })}
                />
                <DaysAhead today={today} plans={list} />
              </div>
              <TodaysPlan today={today} plans={list} />
            </>
          )}
        </QueryView>
      </PageBody>
    </>
  );
}

function TodaysPlan({ today, plans }: { today: string; plans: readonly PlanSummary[] }) {
  const summary = planOfRecord(plans, today);
  return summary && <RunningDay key={summary.id} summary={summary} />;
}
