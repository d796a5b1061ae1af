import { Button } from '../../../components/button.tsx';
import { ToneWord } from '../../../components/chip.tsx';
import { MissionMark } from '../../../components/mission-mark.tsx';
import { EmptyState } from '../../../components/states.tsx';
import { Cell, Head, RowHead, Table } from '../../../components/table.tsx';
import { useMissions } from '../../../hooks/use-missions.ts';
import { degrees, signed } from '../../../lib/format-number.ts';
import { clockSpan, countdown } from '../../../lib/format-time.ts';
import type { ShiftContact } from '../shift-contacts.ts';

interface Props {
  contacts: readonly ShiftContact[];
  now: number;
  labelOf: (id: string) => string;
  onChange: ((contact: ShiftContact) => void) | null;
}

export function ComingTable({ contacts, now, labelOf, onChange }: Props) {
  const missions = useMissions();
  if (contacts.length === 0)
    return <EmptyState icon="calendar" title="Nothing more comes in these hours" />;
  return (
    <Table caption="Coming contacts">
      <thead>
        <tr>
          <Head>Satellite</Head>
          <Head num>In</Head>
          <Head unit="UTC">From and to</Head>
          <Head>Beam</Head>
          <Head num>Highest</Head>
          {onChange && (
            <Head>
              <span className="sr-only">Change</span>
            </Head>
          )}
        </tr>
      </thead>
      <tbody>
        {contacts.map((one) => {
          const { contact } = one;
          return (
            <tr key={contact.id} className="hover:bg-raised">
              <RowHead>
                <span className="flex items-center gap-2">
                  <MissionMark series={missions.series(contact.missionId)} />
                  {contact.satelliteName}
                  {contact.driftSeconds !== null && (
                    <ToneWord tone="warn" icon="drifted">
                      drifted {signed(contact.driftSeconds, 1)} s
                    </ToneWord>
                  )}
                </span>
              </RowHead>
              <Cell num className="figures">
                {countdown(one.fromMs - now)}
              </Cell>
              <Cell className="figures">{clockSpan(one.fromMs, one.toMs)}</Cell>
              <Cell>
                {labelOf(contact.receive.channelId)}
                {contact.transmit && (
                  <span className="text-ink-muted"> ↑ {labelOf(contact.transmit.channelId)}</span>
                )}
              </Cell>
              <Cell num>{degrees(contact.maxElevationDeg)}</Cell>
              {onChange && (
                <Cell className="text-right">
                  <Button size="small" variant="quiet" onClick={() => onChange(one)}>
                    Change <span className="sr-only">{contact.satelliteName}</span>
                  </Button>
                </Cell>
              )}
            </tr>
          );
        })}
      </tbody>
    </Table>
  );
}
