import { useQuery } from '@tanstack/react-query';
import { useParams } from 'react-router-dom';
import { z } from 'zod';
import { ButtonLink } from '../../components/button.tsx';
import { PageHead, PageBody } from '../../components/page-head.tsx';
import { QueryView } from '../../components/query-view.tsx';
import { PlanStateChip } from '../../components/state-chips.tsx';
import { EmptyState } from '../../components/states.tsx';
import { SignOffSheet } from '../../features/sign-offs/components/sign-off-sheet.tsx';
import { useMissions } from '../../hooks/use-missions.ts';
import { useUser } from '../../hooks/use-session.ts';
import { useTitle } from '../../hooks/use-title.ts';
import { useUrlState } from '../../hooks/use-url-state.ts';
import { dateClock, dayNumber, longDay } from '../../lib/format-time.ts';
import { planQueries } from '../../queries/plan-queries.ts';
import { paths } from '../paths.ts';

const SHAPE = { mission: z.uuid().optional() };

export function Component() {
  const { id = '' } = useParams();
  useTitle('Sign-off');
  const user = useUser();
  const missions = useMissions();
  const [url, setUrl] = useUrlState(SHAPE);
  const plan = useQuery(planQueries.one(id));
  const asked = plan.data?.signOffs ?? [];
  const own = asked.filter((one) => user?.leadsMissionIds.includes(one.missionId));
  const choices = own.length > 0 ? own : asked;
  const signable = plan.data?.signableMissionIds[0];
  const missionId =
    choices.find((one) => one.missionId === url.mission)?.missionId ??
    signable ??
    choices[0]?.missionId ??
    null;
  const data = plan.data;
  return (
    <>
      <PageHead
        title={
          data
            ? `${missionId ? missions.name(missionId) : 'Sign-off'}, ${longDay(data.day)}`
            : 'Sign-off'
        }
        state={data && <PlanStateChip state={data.state} returned={data.returned !== null} />}
        aside={
          data &&
          `day ${dayNumber(data.day)}, revision ${data.revision}${data.submittedBy ? `, submitted by ${data.submittedBy}` : ''}, sign-off wanted by ${dateClock(Date.parse(data.cutOffUtc))} UTC`
        }
        actions={
          <>
            {choices.length > 1 && (
              <div role="group" aria-label="Mission" className="flex gap-1.5">
                {choices.map((one) => (
                  <button
                    key={one.missionId}
                    type="button"
                    aria-pressed={one.missionId === missionId}
                    onClick={() => setUrl({ mission: one.missionId })}
                    className="min-h-8 rounded-control border border-line-strong px-3 text-body aria-pressed:border-accent aria-pressed:bg-accent-soft"
                  >
                    {one.missionName}
                  </button>
                ))}
              </div>
            )}
            {data && <ButtonLink to={paths.plan(data.id)}>The whole day</ButtonLink>}
          </>
        }
      />
      <PageBody>
        <QueryView query={plan} what="This plan">
          {(found) =>
            missionId ? (
              <SignOffSheet key={missionId} plan={found} missionId={missionId} />
            ) : (
              <EmptyState icon="info" title="Nobody has to sign this plan yet">
                When it is submitted, the missions it concerns are asked.
              </EmptyState>
            )
          }
        </QueryView>
      </PageBody>
    </>
  );
}
