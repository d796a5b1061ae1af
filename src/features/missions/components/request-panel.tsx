import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import type { Mission } from '../../../../shared/schemas/mission.ts';
import type { Request } from '../../../../shared/schemas/requirement.ts';
import { useAnnounce } from '../../../components/announcer.tsx';
import { Button } from '../../../components/button.tsx';
import { Chip } from '../../../components/chip.tsx';
import { Panel } from '../../../components/panel.tsx';
import { QueryView } from '../../../components/query-view.tsx';
import { EmptyState, ErrorNote } from '../../../components/states.tsx';
import { Cell, Head, RowHead, Table } from '../../../components/table.tsx';
import { useMay } from '../../../hooks/use-session.ts';
import { dateClock } from '../../../lib/format-time.ts';
import { missionQueries, useWithdrawRequest } from '../../../queries/mission-queries.ts';
import { satelliteQueries } from '../../../queries/satellite-queries.ts';
import { RequestDialog } from './request-dialog.tsx';

const words = (request: Request): string => {
  if (request.kind === 'none') return 'no contact';
  if (request.kind === 'pass') return 'this pass';
  return `${request.minutes ?? 0} min`;
};

/** One-off requests: something beyond the standing lines, with a deadline. */
export function RequestPanel({ mission }: { mission: Mission }) {
  const { may } = useMay();
  const requests = useQuery(missionQueries.requests(mission.id));
  const satellites = useQuery(satelliteQueries.list());
  const withdraw = useWithdrawRequest();
  const announce = useAnnounce();
  const [adding, setAdding] = useState(false);
  const mayEdit = may('edit.requests', { missionId: mission.id });
  const add = mayEdit && (
    <Button size="small" icon="add" onClick={() => setAdding(true)}>
      Ask for something once
    </Button>
  );
  const nameOf = (id: string): string => satellites.data?.find((one) => one.id === id)?.name ?? '';
  return (
    <Panel title="Requests" aside="one-off, beyond the standing lines" actions={add} flush>
      <div className="px-4">
        <ErrorNote error={withdraw.error} />
      </div>
      <QueryView
        query={requests}
        what="The requests"
        isEmpty={(list) => list.length === 0}
        empty={<EmptyState title="No request" action={add} />}
      >
        {(list) => (
          <Table caption={`Requests of ${mission.name}`}>
            <thead>
              <tr>
                <Head>Satellite</Head>
                <Head>Asked</Head>
                <Head unit="UTC">From</Head>
                <Head unit="UTC">To</Head>
                <Head num>Priority</Head>
                <Head>Reason</Head>
                <Head>State</Head>
              </tr>
            </thead>
            <tbody>
              {list.map((request) => (
                <tr key={request.id} className="hover:bg-raised">
                  <RowHead>{nameOf(request.satelliteId)}</RowHead>
                  <Cell>{words(request)}</Cell>
                  <Cell className="figures">{dateClock(Date.parse(request.fromUtc))}</Cell>
                  <Cell className="figures">{dateClock(Date.parse(request.toUtc))}</Cell>
                  <Cell num>{request.priority}</Cell>
                  <Cell>{request.reason}</Cell>
                  <Cell>
                    {request.state === 'withdrawn' ? (
                      <Chip tone="neutral" icon="returned">
                        Withdrawn
                      </Chip>
                    ) : mayEdit ? (
                      <Button
                        size="small"
                        busy={withdraw.isPending && withdraw.variables.id === request.id}
                        onClick={() =>
                          withdraw.mutate(request, {
                            onSuccess: () => announce('The request is withdrawn.'),
                          })
                        }
                      >
                        Withdraw
                      </Button>
                    ) : (
                      <Chip tone="info" icon="clock">
                        Open
                      </Chip>
                    )}
                  </Cell>
                </tr>
              ))}
            </tbody>
          </Table>
        )}
      </QueryView>
      {adding && (
        <RequestDialog
          mission={mission}
          satellites={(satellites.data ?? []).filter((one) => one.missionId === mission.id)}
          onClose={() => setAdding(false)}
        />
      )}
    </Panel>
  );
}
