import { Link } from 'react-router-dom';
import type { Satellite } from '../../../../shared/schemas/satellite.ts';
import { Chip } from '../../../components/chip.tsx';
import { MissionMark } from '../../../components/mission-mark.tsx';
import { Cell, Head, RowHead, Table } from '../../../components/table.tsx';
import { useMissions } from '../../../hooks/use-missions.ts';
import { useNow } from '../../../hooks/use-now.ts';
import { useSorted } from '../../../hooks/use-sorted.ts';
import { frequency, MISSING } from '../../../lib/format-number.ts';
import { ageWords } from '../../../lib/format-time.ts';
import { HOUR_MS, MINUTE_MS } from '../../../../shared/time.ts';
import { polarisationWord } from '../../../lib/polarisation.ts';

const ORDERS = {
  name: (satellite: Satellite) => satellite.name,
  catalog: (satellite: Satellite) => satellite.catalogNumber ?? 0,
  downlink: (satellite: Satellite) => satellite.downlink.frequencyMhz,
  age: (satellite: Satellite) => satellite.elementSetEpochUtc ?? '',
};

export function SatelliteTable({ satellites }: { satellites: readonly Satellite[] }) {
  const missions = useMissions();
  const now = useNow(MINUTE_MS);
  const { rows, sortOf } = useSorted(satellites, ORDERS, { by: 'name' });
  return (
    <Table caption="Satellites" fill>
      <thead>
        <tr>
          <Head {...sortOf('name')}>Satellite</Head>
          <Head {...sortOf('catalog')}>Catalogue number</Head>
          <Head>Mission</Head>
          <Head num unit="MHz" {...sortOf('downlink')}>
            Downlink
          </Head>
          <Head>Polarisation</Head>
          <Head num unit="kbit/s">
            Rate
          </Head>
          <Head num unit="MHz">
            Uplink
          </Head>
          <Head {...sortOf('age')}>Element set</Head>
        </tr>
      </thead>
      <tbody>
        {rows.map((satellite) => (
          <tr key={satellite.id} className="hover:bg-raised">
            <RowHead>
              <span className="flex items-center gap-2">
                <MissionMark series={missions.series(satellite.missionId)} />
                <Link to={`/satellites/${satellite.id}`} className="rounded-mark hover:underline">
                  {satellite.name}
                </Link>
                {satellite.retired && (
                  <Chip tone="neutral" icon="layers">
                    Retired
                  </Chip>
                )}
              </span>
            </RowHead>
            <Cell className="font-mono text-mono">{satellite.catalogNumber ?? MISSING}</Cell>
            <Cell>{missions.name(satellite.missionId)}</Cell>
            <Cell num>{frequency(satellite.downlink.frequencyMhz)}</Cell>
            <Cell>{polarisationWord(satellite.downlink.polarisation)}</Cell>
            <Cell num>{satellite.downlink.rateKbps}</Cell>
            <Cell num>{satellite.uplink ? frequency(satellite.uplink.frequencyMhz) : MISSING}</Cell>
            <Cell>
              <SetAge epochUtc={satellite.elementSetEpochUtc} now={now} />
            </Cell>
          </tr>
        ))}
      </tbody>
    </Table>
  );
}

function SetAge({ epochUtc, now }: { epochUtc: string | null; now: number }) {
  if (epochUtc === null)
    return (
      <Chip tone="warn" icon="warning">
        None yet
      </Chip>
    );
  return <>{ageWords(Math.max(0, (now - Date.parse(epochUtc)) / HOUR_MS))} old</>;
}
