import { useQuery } from '@tanstack/react-query';
import type { ElementSetUpload } from '../../../../shared/schemas/element-set.ts';
import { nextDay, shortDay } from '../../../lib/format-time.ts';
import { SideSection } from '../../../components/panel.tsx';
import { PlanStateChip } from '../../../components/state-chips.tsx';
import { useNow } from '../../../hooks/use-now.ts';
import { useStation } from '../../../hooks/use-station.ts';
import { planQueries } from '../../../queries/plan-queries.ts';
import { dayOf, MINUTE_MS } from '../../../../shared/time.ts';

/** What accepting does, and which plans follow the fresh sets. */
export function UploadSide({ upload }: { upload: ElementSetUpload }) {
  const { station } = useStation();
  const today = dayOf(useNow(MINUTE_MS));
  const plans = useQuery({
    ...planQueries.list({
      stationId: station?.id ?? '',
      fromDay: today,
      toDay: nextDay(today, 10),
    }),
    enabled: station !== null,
  });
  const shown = (plans.data ?? []).filter(({ state }) => state !== 'superseded');
  const fresh = upload.accepted.filter(({ unchanged }) => !unchanged).length;
  return (
    <>
      <SideSection title="What accepting does">
        <p className="text-ink-muted">
          {fresh === 0
            ? 'No set is newer than the one in use, so passes stay as they are.'
            : `Passes of ${fresh === 1 ? 'one satellite' : `${fresh} satellites`} are computed again for the next ten days. Pointing follows the fresh sets at once.`}
        </p>
        <p className="mt-2 text-ink-muted">
          Sets of satellites that are not in the fleet are kept unassigned, until the satellite is
          added.
        </p>
      </SideSection>
      {shown.length > 0 && (
        <SideSection title="Plans that follow">
          <ul>
            {shown.map((plan) => (
              <li
                key={plan.id}
                className="flex items-center gap-2.5 border-t border-line-soft py-2 first:border-t-0"
              >
                <span className="font-semibold">{shortDay(plan.day)}</span>
                <span className="text-ink-muted">revision {plan.revision}</span>
                <PlanStateChip state={plan.state} returned={plan.returned !== null} />
              </li>
            ))}
          </ul>
          <p className="mt-2 text-caption text-ink-muted">
            Contacts that move within the guard time stay. Others are timed again; where one no
            longer fits, its plan says so.
          </p>
        </SideSection>
      )}
    </>
  );
}
