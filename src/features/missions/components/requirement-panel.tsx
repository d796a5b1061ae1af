import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import type { Mission } from '../../../../shared/schemas/mission.ts';
import type { Requirement } from '../../../../shared/schemas/requirement.ts';
import { useAnnounce } from '../../../components/announcer.tsx';
import { Button } from '../../../components/button.tsx';
import { Dialog } from '../../../components/dialog.tsx';
import { Panel } from '../../../components/panel.tsx';
import { QueryView } from '../../../components/query-view.tsx';
import { EmptyState, ErrorNote } from '../../../components/states.tsx';
import { Cell, Head, RowHead, Table } from '../../../components/table.tsx';
import { useMay } from '../../../hooks/use-session.ts';
import { missionQueries, useDeleteRequirement } from '../../../queries/mission-queries.ts';
import { amountWords, conditionWords, UPLINK_WORDS, WHAT_WORDS } from '../requirement-words.ts';
import { RequirementDialog } from './requirement-dialog.tsx';

/** The standing requirement lines of a mission: every day's plan is held against them. */
export function RequirementPanel({ mission }: { mission: Mission }) {
  const { may } = useMay();
  const lines = useQuery(missionQueries.requirements(mission.id));
  const [open, setOpen] = useState<Requirement | 'new' | null>(null);
  const [leaving, setLeaving] = useState<Requirement | null>(null);
  const mayEdit = may('edit.requirements', { missionId: mission.id });
  const add = mayEdit && (
    <Button size="small" icon="add" onClick={() => setOpen('new')}>
      Add a line
    </Button>
  );
  return (
    <Panel title="Requirement lines" aside="held against every day’s plan" actions={add} flush>
      <QueryView
        query={lines}
        what="The requirement lines"
        isEmpty={(list) => list.length === 0}
        empty={
          <EmptyState title="Nothing is asked yet" action={add}>
            Without a line the mission’s passes are served where there is room.
          </EmptyState>
        }
      >
        {(list) => (
          <Table caption={`Requirement lines of ${mission.name}`}>
            <thead>
              <tr>
                <Head>What</Head>
                <Head>Asked</Head>
                <Head>For</Head>
                <Head>Uplink</Head>
                <Head>A contact counts when</Head>
                {mayEdit && (
                  <Head>
                    <span className="sr-only">Change</span>
                  </Head>
                )}
              </tr>
            </thead>
            <tbody>
              {list.map((line) => (
                <tr key={line.id} className="hover:bg-raised">
                  <RowHead>{WHAT_WORDS[line.what]}</RowHead>
                  <Cell>{amountWords(line)} a day</Cell>
                  <Cell>
                    {line.appliesTo === 'each' ? 'each satellite' : 'all satellites together'}
                  </Cell>
                  <Cell>{UPLINK_WORDS[line.uplink]}</Cell>
                  <Cell muted>{conditionWords(line)}</Cell>
                  {mayEdit && (
                    <Cell className="text-right whitespace-nowrap">
                      <Button size="small" variant="quiet" onClick={() => setOpen(line)}>
                        Change
                      </Button>
                      <Button size="small" variant="quiet" onClick={() => setLeaving(line)}>
                        Delete
                      </Button>
                    </Cell>
                  )}
                </tr>
              ))}
            </tbody>
          </Table>
        )}
      </QueryView>
      {open && (
        <RequirementDialog
          mission={mission}
          line={open === 'new' ? null : open}
          onClose={() => setOpen(null)}
        />
      )}
      {leaving && <DeleteDialog line={leaving} onClose={() => setLeaving(null)} />}
    </Panel>
  );
}

function DeleteDialog({ line, onClose }: { line: Requirement; onClose: () => void }) {
  const remove = useDeleteRequirement();
  const announce = useAnnounce();
  return (
    <Dialog
      open
      onClose={onClose}
      title="Delete this line?"
      description={`${WHAT_WORDS[line.what]}, ${amountWords(line)} a day. Rounds of sign-off that are open keep their copy.`}
      footer={
        <>
          <Button onClick={onClose}>Keep it</Button>
          <Button
            variant="danger"
            busy={remove.isPending}
            onClick={() =>
              remove.mutate(line, {
                onSuccess: () => {
                  announce('The line is deleted.');
                  onClose();
                },
              })
            }
          >
            Delete the line
          </Button>
        </>
      }
    >
      <ErrorNote error={remove.error} />
    </Dialog>
  );
}
