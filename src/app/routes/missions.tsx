import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { Link } from 'react-router-dom';
import type { Mission } from '../../../shared/schemas/mission.ts';
import { Button } from '../../components/button.tsx';
import { Chip } from '../../components/chip.tsx';
import { MissionMark } from '../../components/mission-mark.tsx';
import { PageBody, PageHead } from '../../components/page-head.tsx';
import { Panel } from '../../components/panel.tsx';
import { QueryView } from '../../components/query-view.tsx';
import { EmptyState } from '../../components/states.tsx';
import { Cell, Head, RowHead, Table } from '../../components/table.tsx';
import { MissionDialog } from '../../features/missions/components/mission-dialog.tsx';
import { useMay } from '../../hooks/use-session.ts';
import { useSorted } from '../../hooks/use-sorted.ts';
import { useTitle } from '../../hooks/use-title.ts';
import { counted, MISSING } from '../../lib/format-number.ts';
import { missionQueries } from '../../queries/mission-queries.ts';
import { paths } from '../paths.ts';

export function Component() {
  useTitle('Missions');
  const { may } = useMay();
  const missions = useQuery(missionQueries.list());
  const [adding, setAdding] = useState(false);
  const add = may('create.missions') && (
    <Button variant="primary" icon="add" onClick={() => setAdding(true)}>
      Add a mission
    </Button>
  );
  return (
    <>
      <PageHead
        title="Missions"
        aside={missions.data && counted(missions.data.length, 'mission')}
        actions={add}
      />
      <PageBody>
        <Panel title="Whom the station serves" flush>
          <QueryView
            query={missions}
            what="The missions"
            isEmpty={(list) => list.length === 0}
            empty={
              <EmptyState title="No mission yet" action={add}>
                A mission has satellites, requirement lines and leads who sign for it.
              </EmptyState>
            }
          >
            {(list) => <MissionTable missions={list} />}
          </QueryView>
        </Panel>
      </PageBody>
      {adding && <MissionDialog mission={null} onClose={() => setAdding(false)} />}
    </>
  );
}

const ORDERS = {
  name: (mission: Mission) => mission.name,
  priority: (mission: Mission) => mission.priority,
};

function MissionTable({ missions }: { missions: readonly Mission[] }) {
  const { rows, sortOf } = useSorted(missions, ORDERS, { by: 'priority' });
  return (
    <Table caption="Missions" fill>
      <thead>
        <tr>
          <Head {...sortOf('name')}>Mission</Head>
          <Head>Code</Head>
          <Head num {...sortOf('priority')}>
            Priority
          </Head>
          <Head>Leads</Head>
        </tr>
      </thead>
      <tbody>
        {rows.map((mission) => (
          <tr key={mission.id} className="hover:bg-raised">
            <RowHead>
              <span className="flex items-center gap-2">
                <MissionMark series={mission.series} />
                <Link to={paths.mission(mission.id)} className="rounded-mark hover:underline">
                  {mission.name}
                </Link>
                {mission.retired && (
                  <Chip tone="neutral" icon="layers">
                    Retired
                  </Chip>
                )}
              </span>
            </RowHead>
            <Cell className="font-mono text-mono">{mission.code}</Cell>
            <Cell num>{mission.priority}</Cell>
            <Cell>{mission.leadNames.join(', ') || MISSING}</Cell>
          </tr>
        ))}
      </tbody>
    </Table>
  );
}
