import { Cell, Head, RowHead, Table } from '../../../../components/table.tsx';
import { useSize } from '../../../../hooks/use-size.ts';
import { decimals } from '../../../../lib/format-number.ts';
import { usePlanDesk } from '../../hooks/plan-desk.ts';
import type { SkyBeam } from '../../hooks/use-sky-instant.ts';
import type { BeamPair } from '../../model/close-pairs.ts';
import { BeamCut } from './beam-cut.tsx';
import { Sheaf, SheafScale } from './sheaf.tsx';

interface Props {
  beams: readonly SkyBeam[];
  pairs: readonly BeamPair[];
}

/** Beside the sky: the pattern on the u-v plane, the closest pairs, and the cut through the closest. */
export function SheafPanel({ beams, pairs }: Props) {
  const { plan, faces, satellites } = usePlanDesk();
  const [ref, { width, height }] = useSize();
  const face = beams[0]?.face ?? faces[0];
  const pair = pairs[0] ?? null;
  const own = beams.filter((beam) => beam.face.id === face?.id);
  const frequencyMhz =
    satellites.get((pair?.a ?? own[0])?.contact.satelliteId ?? '')?.downlink.frequencyMhz ?? null;
  const fallbackMhz = face ? (face.receiveBandMhz[0] + face.receiveBandMhz[1]) / 2 : 2200;
  const size = Math.max(180, Math.min(width - 264, height - 330, 340));
  return (
    <section
      aria-labelledby="sheaf"
      ref={ref}
      className="min-h-0 min-w-0 overflow-hidden bg-raised px-5 py-3"
    >
      <h2 id="sheaf" className="text-section font-semibold">
        The sheaf{' '}
        <span className="ml-1 text-table font-normal text-ink-muted">
          receive beams of {face?.label}, u–v plane
        </span>
      </h2>
      {face && width > 0 && (
        <div className="mt-4 flex gap-6">
          <Sheaf
            face={face}
            beams={own}
            frequencyMhz={frequencyMhz ?? fallbackMhz}
            limitDb={plan.limitOfDayDb}
            pair={pair}
            size={size}
          />
          <div className="min-w-0 flex-1">
            <SheafScale />
            <ClosestPairs pairs={pairs} />
          </div>
        </div>
      )}
      {pair && frequencyMhz !== null && (
        <>
          <div className="mt-5 flex items-baseline justify-between gap-3">
            <h3 className="font-semibold">
              Cut through {pair.a.contact.satelliteName} and {pair.b.contact.satelliteName}
            </h3>
            <span className="figures text-caption text-ink-muted">
              {decimals(pair.apartDeg, 1)}° apart, {decimals(pair.hpbw, 2)} half-power widths
            </span>
          </div>
          <BeamCut
            pair={pair}
            frequencyMhz={frequencyMhz}
            width={width - 40}
            height={Math.max(150, Math.min(240, height - Math.max(size, 318) - 100))}
          />
        </>
      )}
    </section>
  );
}

/** Two satellites of one family are named once: `Osket 7 – 5`. */
function pairName({ a, b }: BeamPair): string {
  const [first, second] = [a.contact.satelliteName, b.contact.satelliteName];
  const family = /^(.*\s)\S+$/.exec(first)?.[1];
  return family && second.startsWith(family)
    ? `${first} – ${second.slice(family.length)}`
    : `${first} – ${second}`;
}

function ClosestPairs({ pairs }: { pairs: readonly BeamPair[] }) {
  if (pairs.length === 0)
    return <p className="mt-3 text-caption text-ink-muted">No two beams share a frequency now.</p>;
  return (
    <div className="mt-3">
      <Table caption="Closest pairs on one frequency" bare>
        <thead>
          <tr>
            <Head>Closest pairs</Head>
            <Head num>dB</Head>
            <Head num>needs</Head>
          </tr>
        </thead>
        <tbody>
          {pairs.slice(0, 4).map((pair, index) => (
            <tr key={`${pair.a.contact.id} ${pair.b.contact.id}`}>
              <RowHead
                className={index === 0 ? 'whitespace-nowrap' : 'font-normal! whitespace-nowrap'}
              >
                {pairName(pair)}
              </RowHead>
              <Cell num strong={index === 0}>
                {decimals(pair.isolationDb, 1)}
              </Cell>
              <Cell num muted>
                {decimals(pair.neededDb, 1)}
              </Cell>
            </tr>
          ))}
        </tbody>
      </Table>
    </div>
  );
}
