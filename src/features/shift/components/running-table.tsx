import { useQuery } from '@tanstack/react-query';
import { dopplerHz } from '../../../../shared/link/doppler.ts';
import { lookAnglesAt } from '../../../../shared/orbit/track.ts';
import { HOUR_MS } from '../../../../shared/time.ts';
import { Button } from '../../../components/button.tsx';
import { ToneWord } from '../../../components/chip.tsx';
import { MissionMark } from '../../../components/mission-mark.tsx';
import { EmptyState } from '../../../components/states.tsx';
import { Cell, Head, RowHead, Table } from '../../../components/table.tsx';
import { useMissions } from '../../../hooks/use-missions.ts';
import { decimals, MISSING, signed } from '../../../lib/format-number.ts';
import { ageWords, clockSeconds, countdown } from '../../../lib/format-time.ts';
import { passQueries } from '../../../queries/pass-queries.ts';
import { satelliteQueries } from '../../../queries/satellite-queries.ts';
import type { ShiftContact } from '../shift-contacts.ts';

interface Props {
  contacts: readonly ShiftContact[];
  now: number;
  labelOf: (id: string) => string;
  onChange: ((contact: ShiftContact) => void) | null;
}

export function RunningTable({ contacts, now, labelOf, onChange }: Props) {
  if (contacts.length === 0)
    return <EmptyState icon="clock" title="No beam is up at this moment" />;
  return (
    <Table caption="Contacts up now">
      <thead>
        <tr>
          <Head>Satellite</Head>
          <Head>Beam</Head>
          <Head num>Ends in</Head>
          <Head num unit="deg">
            Azimuth
          </Head>
          <Head num unit="deg">
            Elevation
          </Head>
          <Head num unit="km">
            Range
          </Head>
          <Head num unit="km/s">
            Range rate
          </Head>
          <Head num unit="kHz">
            Doppler
          </Head>
          <Head>Elements</Head>
          {onChange && (
            <Head>
              <span className="sr-only">Change</span>
            </Head>
          )}
        </tr>
      </thead>
      <tbody>
        {contacts.map((one) => (
          <RunningRow key={one.contact.id} one={one} {...{ now, labelOf, onChange }} />
        ))}
      </tbody>
    </Table>
  );
}

function RunningRow({
  one,
  now,
  labelOf,
  onChange,
}: Omit<Props, 'contacts'> & { one: ShiftContact }) {
  const missions = useMissions();
  const { contact } = one;
  const track = useQuery(passQueries.track(contact.passId));
  const pass = useQuery(passQueries.one(contact.passId));
  const satellites = useQuery(satelliteQueries.list());
  const downlinkMhz = satellites.data?.find(({ id }) => id === contact.satelliteId)?.downlink
    .frequencyMhz;
  const look = track.data && lookAnglesAt(track.data, now);
  const ageHours = pass.data && (now - Date.parse(pass.data.elementSetEpochUtc)) / HOUR_MS;
  return (
    <tr className="text-section">
      <RowHead>
        <span className="flex items-center gap-2">
          <MissionMark series={missions.series(contact.missionId)} />
          {contact.satelliteName}
          {contact.driftSeconds !== null && (
            <ToneWord tone="warn" icon="drifted">
              {signed(contact.driftSeconds, 1)} s
            </ToneWord>
          )}
        </span>
      </RowHead>
      <Cell>
        {labelOf(contact.receive.channelId)}
        {contact.transmit && (
          <span className="text-ink-muted"> ↑ {labelOf(contact.transmit.channelId)}</span>
        )}
      </Cell>
      <Cell num className="figures">
        {countdown(one.toMs - now)}
        <span className="block text-caption text-ink-muted">{clockSeconds(one.toMs)}</span>
      </Cell>
      <Cell num>{decimals(look?.azimuthDeg, 1)}</Cell>
      <Cell num>{decimals(look?.elevationDeg, 1)}</Cell>
      <Cell num>{decimals(look?.rangeKm, 0)}</Cell>
      <Cell num>{decimals(look?.rangeRateKmS, 2)}</Cell>
      <Cell num>
        {downlinkMhz !== undefined && look
          ? signed(dopplerHz(downlinkMhz, look.rangeRateKmS) / 1000, 1)
          : MISSING}
      </Cell>
      <Cell className="text-table">
        {ageHours === undefined ? '' : `${ageWords(ageHours)} old`}
      </Cell>
      {onChange && (
        <Cell className="text-right">
          <Button size="small" onClick={() => onChange(one)}>
            Change <span className="sr-only">{contact.satelliteName}</span>
          </Button>
        </Cell>
      )}
    </tr>
  );
}
