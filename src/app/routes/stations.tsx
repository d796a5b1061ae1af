import { Link } from 'react-router-dom';
import type { Station } from '../../../shared/schemas/station.ts';
import { useQuery } from '@tanstack/react-query';
import { Chip } from '../../components/chip.tsx';
import { PageBody, PageHead } from '../../components/page-head.tsx';
import { Panel } from '../../components/panel.tsx';
import { QueryView } from '../../components/query-view.tsx';
import { EmptyState } from '../../components/states.tsx';
import { Cell, Head, RowHead, Table } from '../../components/table.tsx';
import { useNow } from '../../hooks/use-now.ts';
import { useTitle } from '../../hooks/use-title.ts';
import { counted, decimals } from '../../lib/format-number.ts';
import { localClock } from '../../lib/format-time.ts';
import { MINUTE_MS } from '../../../shared/time.ts';
import { stationQueries } from '../../queries/station-queries.ts';
import { paths } from '../paths.ts';

export function Component() {
  useTitle('Stations');
  const stations = useQuery(stationQueries.list());
  return (
    <>
      <PageHead
        title="Stations"
        aside={stations.data && counted(stations.data.length, 'station')}
      />
      <PageBody>
        <Panel title="Where the arrays stand" flush>
          <QueryView
            query={stations}
            what="The stations"
            isEmpty={(list) => list.length === 0}
            empty={
              <EmptyState title="No station yet">
                An administrator adds the first one over the API.
              </EmptyState>
            }
          >
            {(list) => <StationTable stations={list} />}
          </QueryView>
        </Panel>
      </PageBody>
    </>
  );
}

function StationTable({ stations }: { stations: readonly Station[] }) {
  const now = useNow(MINUTE_MS);
  return (
    <Table caption="Stations">
      <thead>
        <tr>
          <Head>Station</Head>
          <Head num unit="deg">
            Latitude
          </Head>
          <Head num unit="deg">
            Longitude
          </Head>
          <Head num unit="m">
            Height
          </Head>
          <Head>Local time</Head>
          <Head>Transmission</Head>
        </tr>
      </thead>
      <tbody>
        {stations.map((station) => (
          <tr key={station.id} className="hover:bg-raised">
            <RowHead>
              <Link to={paths.station(station.id)} className="rounded-mark hover:underline">
                {station.name}
              </Link>
            </RowHead>
            <Cell num>{decimals(station.latitudeDeg, 2)}</Cell>
            <Cell num>{decimals(station.longitudeDeg, 2)}</Cell>
            <Cell num>{decimals(station.heightM, 0)}</Cell>
            <Cell>
              {localClock(now, station.timeZone)} {station.timeZone}
            </Cell>
            <Cell>
              {station.transmitInhibit ? (
                <Chip tone="danger" icon="needsAttention">
                  Inhibited
                </Chip>
              ) : (
                <Chip tone="ok" icon="approve">
                  Allowed
                </Chip>
              )}
            </Cell>
          </tr>
        ))}
      </tbody>
    </Table>
  );
}
