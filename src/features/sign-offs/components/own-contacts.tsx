import { useQuery } from '@tanstack/react-query';
import type { Contact } from '../../../../shared/schemas/plan.ts';
import { dayInterval, toIso } from '../../../../shared/time.ts';
import { EmptyState } from '../../../components/states.tsx';
import { Cell, Head, RowHead, Table } from '../../../components/table.tsx';
import { decimals, directionWords, MISSING } from '../../../lib/format-number.ts';
import { clockSeconds, minutesSeconds } from '../../../lib/format-time.ts';
import { passQueries } from '../../../queries/pass-queries.ts';
import { stationQueries } from '../../../queries/station-queries.ts';

interface Props {
  contacts: readonly Contact[];
  stationId: string;
  day: string;
  /** The row under the pointer, so that its track stands out on the sky. */
  onFollow: (contactId: string | null) => void;
}

export function OwnContacts({ contacts, stationId, day, onFollow }: Props) {
  const { fromMs: dayFromMs, toMs: dayToMs } = dayInterval(day);
  const passes = useQuery(
    passQueries.list({ stationId, fromUtc: toIso(dayFromMs), toUtc: toIso(dayToMs) }),
  );
  const channels = useQuery(stationQueries.channels(stationId));
  const labelOf = (id: string): string =>
    channels.data?.find((one) => one.id === id)?.label ?? MISSING;
  if (contacts.length === 0)
    return <EmptyState icon="calendar" title="The plan holds no contact of this mission" />;
  return (
    <Table caption="Contacts of the mission">
      <thead>
        <tr>
          <Head>Satellite</Head>
          <Head unit="UTC">From</Head>
          <Head unit="UTC">To</Head>
          <Head num>min</Head>
          <Head num unit="deg">
            Highest
          </Head>
          <Head>Rises to sets</Head>
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
          const pass = passes.data?.find((one) => one.id === contact.passId);
          return (
            <tr
              key={contact.id}
              className="hover:bg-raised"
              onPointerEnter={() => onFollow(contact.id)}
              onPointerLeave={() => onFollow(null)}
            >
              <RowHead>{contact.satelliteName}</RowHead>
              <Cell className="figures">{clockSeconds(fromMs)}</Cell>
              <Cell className="figures">{clockSeconds(toMs)}</Cell>
              <Cell num>{minutesSeconds(toMs - fromMs)}</Cell>
              <Cell num>{decimals(contact.maxElevationDeg, 0)}</Cell>
              <Cell muted>{pass ? directionWords(pass) : MISSING}</Cell>
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
