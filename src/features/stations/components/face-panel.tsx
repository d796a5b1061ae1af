import { useQuery } from '@tanstack/react-query';
import type { Face } from '../../../../shared/schemas/face.ts';
import type { Station } from '../../../../shared/schemas/station.ts';
import { scanAngleForLoss } from '../../../../shared/array/scan-loss.ts';
import { toDegrees } from '../../../../shared/units.ts';
import { Panel } from '../../../components/panel.tsx';
import { QueryView } from '../../../components/query-view.tsx';
import { EmptyState } from '../../../components/states.tsx';
import { Cell, Head, RowHead, Table } from '../../../components/table.tsx';
import { decimals } from '../../../lib/format-number.ts';
import { stationQueries } from '../../../queries/station-queries.ts';

const ARCHITECTURE: Record<Face['architecture'], string> = {
  digital: 'digital, every element sampled',
  hybrid: 'hybrid, one RF chain a channel',
  analog: 'analog, one beam',
};
const band = (mhz: readonly [number, number] | null): string =>
  mhz ? `${mhz[0]} to ${mhz[1]}` : '–';

/** The array faces with what follows from their geometry. */
export function FacePanel({ station }: { station: Station }) {
  const faces = useQuery(stationQueries.faces(station.id));
  return (
    <Panel title="Array faces" flush>
      <QueryView
        query={faces}
        what="The faces"
        isEmpty={(list) => list.length === 0}
        empty={<EmptyState title="No face yet" />}
      >
        {(list) => (
          <Table caption="Array faces">
            <thead>
              <tr>
                <Head>Face</Head>
                <Head>Architecture</Head>
                <Head num unit="deg">
                  Boresight az
                </Head>
                <Head num unit="deg">
                  el
                </Head>
                <Head num>Elements</Head>
                <Head num unit="dB">
                  Limit
                </Head>
                <Head num unit="deg">
                  at scan angle
                </Head>
                <Head num unit="dB">
                  Hard end
                </Head>
                <Head num unit="MHz">
                  Receive
                </Head>
                <Head num unit="MHz">
                  Transmit
                </Head>
                <Head num>Transmit beams</Head>
              </tr>
            </thead>
            <tbody>
              {list.map((face) => (
                <tr key={face.id}>
                  <RowHead>{face.label}</RowHead>
                  <Cell>{ARCHITECTURE[face.architecture]}</Cell>
                  <Cell num>{decimals(face.boresightAzimuthDeg, 0)}</Cell>
                  <Cell num>{decimals(face.boresightElevationDeg, 0)}</Cell>
                  <Cell num>{face.elementsX * face.elementsY}</Cell>
                  <Cell num>{decimals(face.normalLimitDb, 1)}</Cell>
                  <Cell num>
                    {decimals(toDegrees(scanAngleForLoss(face, face.normalLimitDb)), 1)}
                  </Cell>
                  <Cell num>{decimals(face.hardEndDb, 1)}</Cell>
                  <Cell num>{band(face.receiveBandMhz)}</Cell>
                  <Cell num>{band(face.transmitBandMhz)}</Cell>
                  <Cell num>{face.transmitBeamLimit}</Cell>
                </tr>
              ))}
            </tbody>
          </Table>
        )}
      </QueryView>
    </Panel>
  );
}
