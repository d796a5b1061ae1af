import { useQuery } from '@tanstack/react-query';
import { dayOf, HOUR_MS, MINUTE_MS, toIso } from '../../../shared/time.ts';
import { isHidden } from '../../../shared/schemas/plan.ts';
import { ButtonLink } from '../../components/button.tsx';
import { InhibitBar } from '../../components/inhibit-bar.tsx';
import { PageBody, PageHead } from '../../components/page-head.tsx';
import { QueryView } from '../../components/query-view.tsx';
import { EmptyState } from '../../components/states.tsx';
import { ShiftBoard } from '../../features/shift/components/shift-board.tsx';
import { useMay } from '../../hooks/use-session.ts';
import { useNow } from '../../hooks/use-now.ts';
import { useStation } from '../../hooks/use-station.ts';
import { useTitle } from '../../hooks/use-title.ts';
import { planQueries } from '../../queries/plan-queries.ts';
import { paths } from '../paths.ts';

/** A shift looks back to what is not logged yet and forward over midnight. */
const BACK_MS = 12 * HOUR_MS;
const AHEAD_MS = 12 * HOUR_MS;

export function Component() {
  useTitle('Shift');
  const { station } = useStation();
  const { may } = useMay();
  const now = useNow(MINUTE_MS);
  const plans = useQuery({
    ...planQueries.list({
      stationId: station?.id ?? '',
      fromDay: dayOf(now - BACK_MS),
      toDay: dayOf(now + AHEAD_MS),
    }),
    enabled: station !== null,
    refetchInterval: MINUTE_MS,
  });
  const released = (plans.data ?? []).filter((plan) => plan.state === 'released');
  return (
    <>
      <PageHead
        title="Shift"
        aside={station && `${station.name}, plans released for ${toIso(now).slice(0, 10)}`}
        actions={<ButtonLink to={paths.plans}>Day plans</ButtonLink>}
      />
      <PageBody>
        {station && <InhibitBar station={station} />}
        <QueryView
          query={plans}
          what="The plans of the shift"
          isEmpty={() => released.length === 0}
          empty={
            <EmptyState icon="calendar" title="No plan is released for these hours">
              What is released appears here by itself.
            </EmptyState>
          }
        >
          {() =>
            station && (
              <ShiftBoard
                station={station}
                plans={released}
                mayOperate={may('plan.operate')}
                mayLog={may('log.contacts')}
                isOwn={(contact) => !isHidden(contact)}
              />
            )
          }
        </QueryView>
      </PageBody>
    </>
  );
}
