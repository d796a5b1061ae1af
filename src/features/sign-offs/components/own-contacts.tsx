import { useQuery } from '@tanstack/react-query';
import type { Contact } from '../../../../shared/schemas/plan.ts';
import { PassThumb } from '../../../components/pass-thumb.tsx';
import { EmptyState } from '../../../components/states.tsx';
import { Cell, Head, RowHead, Table } from '../../../components/table.tsx';
import { useMissions } from '../../../hooks/use-missions.ts';
import { useSkyGround } from '../../../hooks/use-sky-ground.ts';
import { decimals, MISSING } from '../../../lib/format-number.ts';
import { clockSeconds, minutesSeconds } from '../../../lib/format-time.ts';
import { stationQueries } from '../../../queries/station-queries.ts';

interface Props {
  contacts: readonly Contact[];
  stationId: string;
}

export function OwnContacts({ contacts, stationId }: Props) {
  const ground = useSkyGround(stationId, null);
  const missions = useMissions();
  const channels = useQuery(stationQueries.channels(stationId));
  const labelOf = (id: string): string =>
    channels.data?.find((one) => one.id === id)?.label ?? MISSING;
  if (contacts.length === 0)
    return <EmptyState icon="calendar" title="The plan holds no contact of this mission" />;
  return (
    <Table caption="Contacts of the mission">
      <thead>
        <tr>
          <Head>Sky</Head>
          <Head>Satellite</Head>
          <Head unit="UTC">From</Head>
          <Head unit="UTC">To</Head>
          <Head num>min</Head>
          <Head num unit="deg">
            Highest
          </Head>
          <Head num unit="dB">
            Worst scan loss
          </Head>
          <Head num unit="dB">
            Least margin
          </Head>
          <Head>Receive</Head>
          <Head>Uplink</Head>
        </tr>
      </thead>
      <tbody>
        {contacts.map((contact) => {
          const fromMs = Date.parse(contact.receive.fromUtc);
          const toMs = Date.parse(contact.receive.toUtc);
          return (
            <tr key={contact.id}>
              <Cell>
                <PassThumb
                  ground={ground}
                  passId={contact.passId}
                  series={missions.series(contact.missionId)}
                  fromMs={fromMs}
                  toMs={toMs}
                  size={40}
                />
              </Cell>
              <RowHead>{contact.satelliteName}</RowHead>
              <Cell className="figures">{clockSeconds(fromMs)}</Cell>
              <Cell className="figures">{clockSeconds(toMs)}</Cell>
              <Cell num>{minutesSeconds(toMs - fromMs)}</Cell>
              <Cell num>{decimals(contact.maxElevationDeg, 0)}</Cell>
              <Cell num>{decimals(contact.maxScanLossDb, 1)}</Cell>
              <Cell num>{decimals(contact.minMarginDb, 1)}</Cell>
              <Cell>{labelOf(contact.receive.channelId)}</Cell>
              <Cell>{contact.transmit ? `↑ ${labelOf(contact.transmit.channelId)}` : MISSING}</Cell>
            </tr>
          );
        })}
      </tbody>
    </Table>
  );
}
