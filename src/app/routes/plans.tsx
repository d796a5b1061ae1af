import { useQuery } from '@tanstack/react-query';
import { z } from 'zod';
import { Day } from '../../../shared/schemas/common.ts';
import { dayOf, MINUTE_MS } from '../../../shared/time.ts';
import { DayField } from '../../components/day-field.tsx';
import { PageBody, PageHead } from '../../components/page-head.tsx';
import { Panel } from '../../components/panel.tsx';
import { QueryView } from '../../components/query-view.tsx';
import { DayTable } from '../../features/plans/components/days/day-table.tsx';
import { useNow } from '../../hooks/use-now.ts';
import { useMay } from '../../hooks/use-session.ts';
import { useStation } from '../../hooks/use-station.ts';
import { useTitle } from '../../hooks/use-title.ts';
import { useUrlState } from '../../hooks/use-url-state.ts';
import { nextDay } from '../../lib/format-time.ts';
import { planQueries } from '../../queries/plan-queries.ts';

const SHAPE = { from: Day.optional(), days: z.coerce.number().int().min(1).max(31).default(8) };

export function Component() {
  useTitle('Day plans');
  const { station } = useStation();
  const { may } = useMay();
  const [url, setUrl] = useUrlState(SHAPE);
  const today = dayOf(useNow(MINUTE_MS));
  const fromDay = url.from ?? nextDay(today, -1);
  const days = Array.from({ length: url.days }, (_, index) => nextDay(fromDay, index));
  const plans = useQuery({
    ...planQueries.list({
      stationId: station?.id ?? '',
      fromDay,
      toDay: nextDay(fromDay, url.days - 1),
    }),
    enabled: station !== null,
  });
  return (
    <>
      <PageHead
        title="Day plans"
        aside={station && `${station.name}, UTC days`}
        actions={<DayField label="From" value={fromDay} onChange={(from) => setUrl({ from })} />}
      />
      <PageBody>
        <Panel title="Today, tomorrow and the outlook" flush>
          <QueryView query={plans} what="The plans">
            {(list) =>
              station && (
                <DayTable
                  days={days}
                  today={today}
                  plans={list}
                  station={station}
                  mayBegin={may('create.plans')}
                />
              )
            }
          </QueryView>
        </Panel>
      </PageBody>
    </>
  );
}
