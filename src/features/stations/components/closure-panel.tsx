import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import type { Closure } from '../../../../shared/schemas/channel.ts';
import type { Station } from '../../../../shared/schemas/station.ts';
import { useAnnounce } from '../../../components/announcer.tsx';
import { Button } from '../../../components/button.tsx';
import { Chip } from '../../../components/chip.tsx';
import { Panel } from '../../../components/panel.tsx';
import { QueryView } from '../../../components/query-view.tsx';
import { EmptyState, ErrorNote } from '../../../components/states.tsx';
import { Cell, Head, RowHead, Table } from '../../../components/table.tsx';
import { useNow } from '../../../hooks/use-now.ts';
import { useMay } from '../../../hooks/use-session.ts';
import { dateClock } from '../../../lib/format-time.ts';
import { MINUTE_MS } from '../../../../shared/time.ts';
import { stationQueries, useEndClosure } from '../../../queries/station-queries.ts';
import { ClosureDialog } from './closure-dialog.tsx';
import { useScopeNames } from '../use-scope-names.ts';

const isOver = (closure: Closure, now: number): boolean =>
  closure.endedUtc !== null || (closure.toUtc !== null && Date.parse(closure.toUtc) <= now);

/** What is closed, for which direction, until when; a closure is always accepted. */
export function ClosurePanel({ station }: { station: Station }) {
  const { may } = useMay();
  const now = useNow(MINUTE_MS);
  const closures = useQuery(stationQueries.closures(station.id));
  const end = useEndClosure();
  const announce = useAnnounce();
  const nameOf = useScopeNames(station);
  const [adding, setAdding] = useState(false);
  const mayEdit = may('edit.closures');
  const add = mayEdit && (
    <Button size="small" icon="add" onClick={() => setAdding(true)}>
      Add a closure
    </Button>
  );
  return (
    <Panel title="Closures" actions={add} flush>
      <div className="px-4">
        <ErrorNote error={end.error} />
      </div>
      <QueryView
        query={closures}
        what="The closures"
        isEmpty={(list) => list.length === 0}
        empty={<EmptyState icon="approve" title="Nothing is closed" />}
      >
        {(list) => (
          <Table caption="Closures">
            <thead>
              <tr>
                <Head>Closed</Head>
                <Head>Direction</Head>
                <Head unit="UTC">From</Head>
                <Head unit="UTC">To</Head>
                <Head>Effect</Head>
                <Head>Reason</Head>
                <Head>State</Head>
              </tr>
            </thead>
            <tbody>
              {list.map((closure) => (
                <tr key={closure.id} className="hover:bg-raised">
                  <RowHead>{nameOf(closure.scope, closure.scopeId)}</RowHead>
                  <Cell>{closure.direction}</Cell>
                  <Cell className="figures">{dateClock(Date.parse(closure.fromUtc))}</Cell>
                  <Cell className="figures">
                    {closure.toUtc ? dateClock(Date.parse(closure.toUtc)) : 'further notice'}
                  </Cell>
                  <Cell>
                    {closure.reducedByDb === null
                      ? 'out of service'
                      : `reduced by ${closure.reducedByDb} dB`}
                  </Cell>
                  <Cell>{closure.reason}</Cell>
                  <Cell className="whitespace-nowrap">
                    {isOver(closure, now) ? (
                      <Chip tone="neutral" icon="check">
                        Over
                      </Chip>
                    ) : mayEdit && !closure.inhibit ? (
                      <Button
                        size="small"
                        busy={end.isPending && end.variables.id === closure.id}
                        onClick={() =>
                          end.mutate(closure, {
                            onSuccess: () => announce('The closure is ended.'),
                          })
                        }
                      >
                        End it now
                      </Button>
                    ) : (
                      <Chip tone="warn" icon="closure">
                        {closure.inhibit ? 'Inhibit' : 'In force'}
                      </Chip>
                    )}
                  </Cell>
                </tr>
              ))}
            </tbody>
          </Table>
        )}
      </QueryView>
      {adding && <ClosureDialog station={station} onClose={() => setAdding(false)} />}
    </Panel>
  );
}
