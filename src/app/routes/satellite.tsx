import { useQuery } from '@tanstack/react-query';
import { useNavigate, useParams } from 'react-router-dom';
import type { Satellite } from '../../../shared/schemas/satellite.ts';
import { useAnnounce } from '../../components/announcer.tsx';
import { ButtonLink } from '../../components/button.tsx';
import { Chip } from '../../components/chip.tsx';
import { MissionMark } from '../../components/mission-mark.tsx';
import { PageBody, PageHead } from '../../components/page-head.tsx';
import { QueryView } from '../../components/query-view.tsx';
import { Forbidden } from '../../components/states.tsx';
import { SatelliteForm } from '../../features/satellites/components/satellite-form.tsx';
import type { SatelliteBody } from '../../features/satellites/components/satellite-form-parts.ts';
import { useMissions } from '../../hooks/use-missions.ts';
import { useMay } from '../../hooks/use-session.ts';
import { useTitle } from '../../hooks/use-title.ts';
import {
  satelliteQueries,
  useCreateSatellite,
  usePatchSatellite,
} from '../../queries/satellite-queries.ts';
import { paths } from '../paths.ts';

export function Component() {
  const { id = '' } = useParams();
  return id === 'new' ? <NewSatellite /> : <ExistingSatellite key={id} id={id} />;
}

function NewSatellite() {
  useTitle('Add a satellite');
  const { may } = useMay();
  const create = useCreateSatellite();
  const navigate = useNavigate();
  const announce = useAnnounce();
  const save = ({ retired: _retired, ...body }: SatelliteBody, onError: (e: unknown) => void) =>
    create.mutate(body, {
      onError,
      onSuccess: (satellite) => {
        announce(`${satellite.name} is in the fleet.`);
        void navigate(paths.satellites);
      },
    });
  return (
    <>
      <PageHead
        title="Add a satellite"
        aside="Its passes are predicted once an element set with its catalogue number is in use."
        actions={<ButtonLink to={paths.satellites}>All satellites</ButtonLink>}
      />
      <PageBody className="max-w-240">
        {may('edit.satellites') ? (
          <SatelliteForm
            satellite={null}
            readOnly={false}
            busy={create.isPending}
            error={create.error}
            onSave={save}
          />
        ) : (
          <Forbidden what="Adding satellites" who="Operators and schedulers" />
        )}
      </PageBody>
    </>
  );
}

function ExistingSatellite({ id }: { id: string }) {
  const satellite = useQuery(satelliteQueries.one(id));
  const missions = useMissions();
  useTitle(satellite.data?.name ?? 'Satellite');
  const missionId = satellite.data?.missionId ?? null;
  return (
    <>
      <PageHead
        title={
          <span className="flex items-center gap-2.5">
            <MissionMark series={missions.series(missionId)} size={12} />
            {satellite.data?.name ?? 'Satellite'}
          </span>
        }
        state={
          satellite.data?.retired && (
            <Chip tone="neutral" icon="layers">
              Retired
            </Chip>
          )
        }
        aside={
          satellite.data &&
          `${missions.name(missionId)}, catalogue number ${satellite.data.catalogNumber ?? 'not given yet'}`
        }
        actions={
          <>
            <ButtonLink to={`${paths.elementSets}?state=all&satellite=${id}`}>
              Element sets
            </ButtonLink>
            <ButtonLink to={`${paths.passes}?satellite=${id}`}>Passes</ButtonLink>
          </>
        }
      />
      <PageBody className="max-w-240">
        <QueryView query={satellite} what="This satellite">
          {(data) => <EditSatellite key={data.version} satellite={data} />}
        </QueryView>
      </PageBody>
    </>
  );
}

function EditSatellite({ satellite }: { satellite: Satellite }) {
  const { may } = useMay();
  const patch = usePatchSatellite();
  const announce = useAnnounce();
  return (
    <SatelliteForm
      satellite={satellite}
      readOnly={!may('edit.satellites')}
      busy={patch.isPending}
      error={patch.error}
      onSave={(body, onError) =>
        patch.mutate(
          { satellite, body },
          { onError, onSuccess: ({ name }) => announce(`${name} is saved.`) },
        )
      }
    />
  );
}
