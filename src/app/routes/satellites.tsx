import { useQuery } from '@tanstack/react-query';
import { z } from 'zod';
import { ButtonLink } from '../../components/button.tsx';
import { FilterSelect, FilterText } from '../../components/filter-fields.tsx';
import { PageBody, PageHead } from '../../components/page-head.tsx';
import { Panel } from '../../components/panel.tsx';
import { QueryView } from '../../components/query-view.tsx';
import { EmptyState } from '../../components/states.tsx';
import { SatelliteTable } from '../../features/satellites/components/satellite-table.tsx';
import { useMissions } from '../../hooks/use-missions.ts';
import { useMay } from '../../hooks/use-session.ts';
import { useTitle } from '../../hooks/use-title.ts';
import { useUrlState } from '../../hooks/use-url-state.ts';
import { counted } from '../../lib/format-number.ts';
import { satelliteQueries } from '../../queries/satellite-queries.ts';
import { paths } from '../paths.ts';

const SHAPE = { mission: z.uuid().optional(), name: z.string().max(80).optional() };

export function Component() {
  useTitle('Satellites');
  const { may } = useMay();
  const missions = useMissions();
  const [url, setUrl] = useUrlState(SHAPE);
  const satellites = useQuery(satelliteQueries.list());
  const shown = (satellites.data ?? []).filter(
    (one) =>
      (!url.mission || one.missionId === url.mission) &&
      (!url.name || one.name.toLowerCase().includes(url.name.toLowerCase())),
  );
  const add = may('edit.satellites') && (
    <ButtonLink to={paths.satelliteNew} variant="primary" icon="add">
      Add a satellite
    </ButtonLink>
  );
  return (
    <>
      <PageHead
        title="Satellites"
        aside={satellites.data && counted(satellites.data.length, 'satellite')}
        actions={add}
      />
      <PageBody>
        <Panel
          title="The fleet"
          aside={shown.length !== satellites.data?.length && `${shown.length} shown`}
          flush
          actions={
            <>
              <FilterText
                label="Name"
                value={url.name ?? ''}
                onChange={(name) => setUrl({ name })}
              />
              <FilterSelect
                label="Mission"
                value={url.mission ?? ''}
                onChange={(mission) => setUrl({ mission })}
                options={missions.list.map(({ id, name }) => [id, name] as const)}
              />
            </>
          }
        >
          <QueryView
            query={satellites}
            what="The satellites"
            isEmpty={() => shown.length === 0}
            empty={
              satellites.data?.length === 0 ? (
                <EmptyState title="No satellite yet" action={add}>
                  Satellites carry the radio data from which windows and links follow.
                </EmptyState>
              ) : (
                <EmptyState icon="search" title="No satellite fits these filters" />
              )
            }
          >
            {() => <SatelliteTable satellites={shown} />}
          </QueryView>
        </Panel>
      </PageBody>
    </>
  );
}
