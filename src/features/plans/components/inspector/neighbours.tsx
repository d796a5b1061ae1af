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
  neededHpbw: number;
  used: Interval;
}

/** Separation to the nearest beam, against what the rule needs. */
export function SeparationChart({ neighbours, neededHpbw, fromMs, toMs, used }: ChartProps) {
  const nearest = neighbours[0];
  if (!nearest) return null;
  const top = Math.max(4, Math.ceil(neededHpbw * 3));
  return (
    <StripChart
      title={`To ${nearest.contact.satelliteName}`}
      unit="beamwidths"
      points={nearest.points}
      domain={[0, top]}
      limit={{ value: neededHpbw, words: `needs ${neededHpbw}` }}
      best={`least ${decimals(nearest.leastHpbw, 2)}`}
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

export function NeighbourTable({
  neighbours,
  neededHpbw,
}: {
  neighbours: readonly Neighbour[];
  neededHpbw: number;
}) {
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
            <Head num unit="bw">
              Least
            </Head>
            <Head num>At</Head>
          </tr>
        </thead>
        <tbody>
          {neighbours.slice(0, 6).map(({ contact, leastDeg, leastHpbw, leastAtMs }) => (
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
              <Cell num>{decimals(leastDeg, 1)}</Cell>
              <Cell num strong className={leastHpbw < neededHpbw * 1.15 ? 'text-warn-text' : ''}>
                {decimals(leastHpbw, 2)}
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
