import type { Pass } from '../../../../shared/schemas/pass.ts';
import type { SkyGround } from '../../../charts/sky-ground.ts';
import { Chip } from '../../../components/chip.tsx';
import { MissionMark } from '../../../components/mission-mark.tsx';
import { PassThumb } from '../../../components/pass-thumb.tsx';
import { Cell, Head, RowHead, Table } from '../../../components/table.tsx';
import { useMissions } from '../../../hooks/use-missions.ts';
import { useSorted } from '../../../hooks/use-sorted.ts';
import { classNames } from '../../../lib/class-names.ts';
import { azimuth, compassPoint, decimals, MISSING } from '../../../lib/format-number.ts';
import { clockSeconds, minutesSeconds, monthDayClock } from '../../../lib/format-time.ts';
import { usableMs, windowsOf } from '../pass-windows.ts';

interface Props {
  passes: readonly Pass[];
  ground: SkyGround | null;
  chosenId: string | null;
  onChoose: (id: string) => void;
  /** Rows of 72 px and more carry the sky. */
  tall: boolean;
  /** The list spans several days. */
  withDay: boolean;
}

const ORDERS = {
  aos: (pass: Pass) => pass.aosUtc,
  satellite: (pass: Pass) => pass.satelliteName,
  elevation: (pass: Pass) => pass.maxElevationDeg,
  usable: (pass: Pass) => usableMs(pass, 'receive'),
  loss: (pass: Pass) => windowsOf(pass, 'receive')[0]?.minScanLossDb ?? 99,
};

export function PassTable({ passes, ...rest }: Props) {
  const { rows, sortOf } = useSorted(passes, ORDERS, { by: 'aos' });
  return (
    <Table caption="Passes" fill>
      <thead>
        <tr>
          {rest.tall && <Head>Sky</Head>}
          <Head {...sortOf('satellite')}>Satellite</Head>
          <Head {...sortOf('aos')}>AOS UTC</Head>
          <Head>TCA</Head>
          <Head>LOS</Head>
          <Head num unit="min">
            Lasts
          </Head>
          <Head num unit="deg" {...sortOf('elevation')}>
            Highest
          </Head>
          <Head>Rises to sets</Head>
          <Head num unit="km">
            Range at TCA
          </Head>
          <Head num unit="min" {...sortOf('usable')}>
            Usable
          </Head>
          <Head num unit="dB" {...sortOf('loss')}>
            Best loss
          </Head>
          <Head num unit="min">
            Uplink
          </Head>
        </tr>
      </thead>
      <tbody>
        {rows.map((pass) => (
          <PassRow key={pass.id} pass={pass} {...rest} />
        ))}
      </tbody>
    </Table>
  );
}

function PassRow({
  pass,
  ground,
  chosenId,
  onChoose,
  tall,
  withDay,
}: Omit<Props, 'passes'> & { pass: Pass }) {
  const missions = useMissions();
  const series = missions.series(pass.missionId);
  const [aos, los] = [Date.parse(pass.aosUtc), Date.parse(pass.losUtc)];
  const usable = windowsOf(pass, 'receive');
  const uplinkMs = usableMs(pass, 'transmit');
  const loss = usable.length > 0 ? Math.min(...usable.map((w) => w.minScanLossDb)) : null;
  return (
    <tr
      className={classNames(
        pass.id === chosenId ? 'bg-accent-soft' : 'hover:bg-raised',
        usable.length === 0 && 'text-ink-muted',
      )}
    >
      {tall && (
        <Cell>
          <PassThumb
            ground={ground}
            passId={pass.id}
            series={series}
            fromMs={aos}
            toMs={los}
            contacts={usable}
            size={72}
          />
        </Cell>
      )}
      <RowHead>
        <span className="flex items-center gap-2">
          <MissionMark series={series} />
          <button
            type="button"
            className="min-h-6 rounded-mark text-left hover:underline"
            aria-expanded={pass.id === chosenId}
            onClick={() => onChoose(pass.id)}
          >
            {pass.satelliteName}
          </button>
          {pass.vanished && (
            <Chip tone="warn" icon="drifted">
              Vanished
            </Chip>
          )}
        </span>
      </RowHead>
      <Cell>
        {withDay ? `${monthDayClock(aos)}${clockSeconds(aos).slice(5)}` : clockSeconds(aos)}
      </Cell>
      <Cell muted>{clockSeconds(Date.parse(pass.tcaUtc))}</Cell>
      <Cell muted>{clockSeconds(los)}</Cell>
      <Cell num>{minutesSeconds(los - aos)}</Cell>
      <Cell num>{decimals(pass.maxElevationDeg, 1)}</Cell>
      <Cell>
        <span className="figures text-ink-muted">{azimuth(pass.aosAzimuthDeg)}</span>{' '}
        {compassPoint(pass.aosAzimuthDeg)} to {compassPoint(pass.losAzimuthDeg)}{' '}
        <span className="figures text-ink-muted">{azimuth(pass.losAzimuthDeg)}</span>
      </Cell>
      <Cell num muted>
        {Math.round(pass.tcaRangeKm)}
      </Cell>
      <Cell num strong={usable.length > 0}>
        {usable.length > 0 ? minutesSeconds(usableMs(pass, 'receive')) : MISSING}
      </Cell>
      <Cell num>{decimals(loss, 1)}</Cell>
      <Cell num>{uplinkMs > 0 ? minutesSeconds(uplinkMs) : MISSING}</Cell>
    </tr>
  );
}
