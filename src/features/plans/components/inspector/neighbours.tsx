import { StripChart } from '../../../../charts/strip-chart.tsx';
import { MissionMark } from '../../../../components/mission-mark.tsx';
import { Cell, Head, RowHead, Table } from '../../../../components/table.tsx';
import { decimals } from '../../../../lib/format-number.ts';
import { clockMinutes, clockSeconds } from '../../../../lib/format-time.ts';
import type { Interval } from '../../../../../shared/time.ts';
import { usePlanDesk } from '../../hooks/plan-desk.ts';
import { usePlanView } from '../../hooks/plan-view.ts';
import type { Neighbour } from '../../hooks/use-neighbours.ts';
import { legInterval } from '../../model/plan-legs.ts';
import { INSPECTOR_CHART_WIDTH } from './inspector-width.ts';

interface ChartProps extends Interval {
  neighbours: readonly Neighbour[];
  used: Interval;
}

/** Isolation against the tightest beam beside it, and what is needed. */
export function IsolationChart({ neighbours, fromMs, toMs, used }: ChartProps) {
  const tightest = neighbours[0];
  if (!tightest) return null;
  return (
    <StripChart
      title="Isolation"
      unit={`dB to ${tightest.contact.satelliteName}`}
      points={tightest.points}
      domain={[0, 45]}
      limit={{ value: tightest.neededDb, words: `needs ${decimals(tightest.neededDb, 1)}` }}
      best={`least ${decimals(tightest.leastDb, 1)}`}
      color="var(--ink)"
      within={[used]}
      fromMs={fromMs}
      toMs={toMs}
      width={INSPECTOR_CHART_WIDTH}
      marks={[
        { ms: fromMs, word: clockMinutes(fromMs) },
        { ms: toMs, word: clockMinutes(toMs) },
      ]}
    />
  );
}

/** Below the need it must be acted on; within 1.5 dB of it it is worth a look. */
const toneOf = (spareDb: number): string =>
  spareDb < 0 ? 'text-danger-text' : spareDb < 1.5 ? 'text-warn-text' : '';

export function NeighbourTable({ neighbours }: { neighbours: readonly Neighbour[] }) {
  const { missions, labelOf } = usePlanDesk();
  const { showContact } = usePlanView();
  return (
    <div className="mt-2">
      <Table caption="Beams beside it, on one frequency" bare>
        <thead>
          <tr>
            <Head>Beams beside it</Head>
            <Head num unit="deg">
              Apart
            </Head>
            <Head num unit="dB">
              Least
            </Head>
            <Head num>At</Head>
          </tr>
        </thead>
        <tbody>
          {neighbours.slice(0, 6).map(({ contact, apartDeg, leastDb, neededDb, leastAtMs }) => (
            <tr key={contact.id}>
              <RowHead className="font-normal!">
                <button
                  type="button"
                  onClick={() => showContact(contact.id, legInterval(contact.receive))}
                  className="flex min-h-6 items-center gap-1.5 rounded-mark hover:underline"
                >
                  <MissionMark series={missions.series(contact.missionId)} size={8} />
                  {contact.satelliteName}
                  <span className="text-ink-muted">{labelOf(contact.receive.channelId)}</span>
                </button>
              </RowHead>
              <Cell num>{decimals(apartDeg, 1)}</Cell>
              <Cell num strong className={toneOf(leastDb - neededDb)}>
                {decimals(leastDb, 1)}
              </Cell>
              <Cell num muted>
                {clockSeconds(leastAtMs)}
              </Cell>
            </tr>
          ))}
        </tbody>
      </Table>
    </div>
  );
}
