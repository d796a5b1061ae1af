import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { useParams } from 'react-router-dom';
import { Button, ButtonLink } from '../../components/button.tsx';
import { Chip } from '../../components/chip.tsx';
import { MissionMark } from '../../components/mission-mark.tsx';
import { PageBody, PageHead } from '../../components/page-head.tsx';
import { QueryView } from '../../components/query-view.tsx';
import { ErrorState } from '../../components/states.tsx';
import { MissionDialog } from '../../features/missions/components/mission-dialog.tsx';
import { RequestPanel } from '../../features/missions/components/request-panel.tsx';
import { RequirementPanel } from '../../features/missions/components/requirement-panel.tsx';
import { useMay } from '../../hooks/use-session.ts';
import { useTitle } from '../../hooks/use-title.ts';
import { ApiError } from '../../lib/api-error.ts';
import { missionQueries } from '../../queries/mission-queries.ts';
import { paths } from '../paths.ts';

const unknownMission = new ApiError({
  type: 'about:blank',
  title: 'Not found',
  status: 404,
  code: 'not-found',
  detail: 'The mission does not exist, or is not yours to see.',
});

export function Component() {
  const { id = '' } = useParams();
  const { may } = useMay();
  const missions = useQuery(missionQueries.list());
  const mission = missions.data?.find((one) => one.id === id);
  const [editing, setEditing] = useState(false);
  useTitle(mission?.name ?? 'Mission');
  return (
    <>
      <PageHead
        title={
          <span className="flex items-center gap-2.5">
            <MissionMark series={mission?.series ?? null} size={12} />
            {mission?.name ?? 'Mission'}
          </span>
        }
        state={
          mission?.retired && (
            <Chip tone="neutral" icon="layers">
              Retired
            </Chip>
          )
        }
        aside={
          mission &&
          `Priority ${mission.priority}, led by ${mission.leadNames.join(' and ') || 'nobody yet'}`
        }
        actions={
          <>
            <ButtonLink to={`${paths.satellites}?mission=${id}`}>Satellites</ButtonLink>
            <ButtonLink to={`${paths.passes}?mission=${id}`}>Passes</ButtonLink>
            {mission && may('edit.missions', { missionId: id }) && (
              <Button icon="pencil" onClick={() => setEditing(true)}>
                Change
              </Button>
            )}
          </>
        }
      />
      <PageBody>
        <QueryView query={missions} what="This mission">
          {() =>
            mission ? (
              <>
                <RequirementPanel mission={mission} />
                <RequestPanel mission={mission} />
              </>
            ) : (
              <ErrorState error={unknownMission} what="This mission" />
            )
          }
        </QueryView>
      </PageBody>
      {editing && mission && <MissionDialog mission={mission} onClose={() => setEditing(false)} />}
    </>
  );
}
