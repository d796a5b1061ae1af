import { useQuery } from '@tanstack/react-query';
import { faceFigures } from '../../../../shared/link/face-figures.ts';
import type { Face } from '../../../../shared/schemas/face.ts';
import type { Station } from '../../../../shared/schemas/station.ts';
import { ToneWord } from '../../../components/chip.tsx';
import { Panel } from '../../../components/panel.tsx';
import { QueryView } from '../../../components/query-view.tsx';
import { decimals } from '../../../lib/format-number.ts';
import { stationQueries } from '../../../queries/station-queries.ts';

/** What follows from the data of each face: gain, beam, noise, power, grating lobe, exposure. */
export function FaceFiguresPanel({ station }: { station: Station }) {
  const faces = useQuery(stationQueries.faces(station.id));
  return (
    <Panel title="Derived figures" aside="at the middles of the bands">
      <QueryView query={faces} what="The faces">
        {(list) => (
          <div className="grid gap-x-8 gap-y-4 md:grid-cols-2">
            {list.map((face) => (
              <FaceFiguresList
                key={face.id}
                face={face}
                floorDeg={station.receiveElevationFloorDeg}
              />
            ))}
          </div>
        )}
      </QueryView>
      <p className="mt-3 text-caption text-ink-muted">
        The exposure distance is an estimate for all power in one beam that stands still, against an
        example limit. It replaces no survey: local rules and a qualified person come first.
      </p>
    </Panel>
  );
}

function FaceFiguresList({ face, floorDeg }: { face: Face; floorDeg: number }) {
  const { receive, transmit, ...figures } = faceFigures(face, floorDeg);
  const rows: [string, string][] = [
    ['Receive gain', `${decimals(receive.gainDbi, 1)} dBi`],
    ['Half-power beamwidth, broadside', `${decimals(receive.broadsideHpbw.uDeg, 2)}°`],
    ['Half-power beamwidth at the limit', `${decimals(receive.hpbwAtLimit.uDeg, 2)}°`],
    ['G/T, broadside', `${decimals(receive.gOverTDbK, 1)} dB/K`],
    ['Scan angle at the limit', `${decimals(figures.scanAngleAtLimitDeg, 1)}°`],
    ['Sky within the limit', `${decimals(100 * figures.skyCoverage, 0)} %`],
    ['Room before a grating lobe', `${decimals(figures.grating.marginPercent, 1)} %`],
    ...(transmit
      ? ([
          ['EIRP, one beam', `${decimals(transmit.eirpOneBeamDbw, 1)} dBW`],
          [`EIRP, each of ${transmit.beams}`, `${decimals(transmit.eirpEachBeamDbw, 1)} dBW`],
          [
            `Exposure distance, ${decimals(transmit.exposureLimit.limitWM2, 0)} W/m²`,
            `${decimals(transmit.exposureDistanceM, 0)} m`,
          ],
          ['Limit by', `${transmit.exposureLimit.edition}, ${transmit.exposureLimit.asOf}`],
        ] satisfies [string, string][])
      : []),
  ];
  return (
    <section aria-label={face.label}>
      <h3 className="mb-1 text-table font-semibold">{face.label}</h3>
      <dl>
        {rows.map(([name, value]) => (
          <div
            key={name}
            className="flex items-baseline justify-between gap-4 border-b border-line-soft py-1 text-table"
          >
            <dt className="text-ink-muted">{name}</dt>
            <dd className="figures text-right">{value}</dd>
          </div>
        ))}
      </dl>
      {figures.grating.warning && (
        <ToneWord tone="warn" icon="warning" className="mt-1.5 flex">
          {figures.grating.warning}
        </ToneWord>
      )}
    </section>
  );
}
