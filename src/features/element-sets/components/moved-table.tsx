import { Cell, Head, RowHead, Table } from '../../../components/table.tsx';
import { MissionMark } from '../../../components/mission-mark.tsx';
import { Panel } from '../../../components/panel.tsx';
import { useMissions } from '../../../hooks/use-missions.ts';
import { decimals, signed } from '../../../lib/format-number.ts';
import { monthDayClock, shortDay } from '../../../lib/format-time.ts';
import { toIso } from '../../../../shared/time.ts';
import type { MovedSet } from '../moved-sets.ts';

interface Props {
  sets: readonly MovedSet[];
  guardSeconds: number;
  atMs: number;
}

/** What the fresh sets move, as a signed bar with the guard time as a band. */
export function MovedTable({ sets, guardSeconds, atMs }: Props) {
  const missions = useMissions();
  const reach = Math.max(
    guardSeconds * 1.3,
    ...sets.map((set) => Math.min(60, Math.abs(set.lateSeconds ?? 0))),
  );
  return (
    <Panel
      title="Moved since the last sets"
      flush
      actions={
        <span className="text-caption text-ink-muted">
          at 12:00 UTC of {shortDay(toIso(atMs).slice(0, 10))}, largest first; dashed: guard time of{' '}
          {guardSeconds} s
        </span>
      }
    >
      <Table caption="Shift of every satellite against the set in use">
        <thead>
          <tr>
            <Head>Satellite</Head>
            <Head>Epoch, new</Head>
            <Head>Epoch, in use</Head>
            <Head num unit="d">
              Newer
            </Head>
            <Head className="text-center">early · along track · late</Head>
            <Head num unit="s">
              Late
            </Head>
            <Head num unit="km">
              Cross track
            </Head>
          </tr>
        </thead>
        <tbody>
          {sets.map((set) => {
            const beyond = Math.abs(set.lateSeconds ?? 0) > guardSeconds;
            const newerDays =
              (Date.parse(set.epochUtc) - Date.parse(set.inUseEpochUtc)) / 86_400_000;
            return (
              <tr key={set.satelliteId}>
                <RowHead className={beyond ? '' : 'font-normal!'}>
                  <span className="flex items-center gap-2">
                    <MissionMark series={missions.series(set.missionId)} />
                    {set.name}
                    <span className="font-mono text-mono font-normal text-ink-muted">
                      {set.catalogNumber}
                    </span>
                  </span>
                </RowHead>
                <Cell>{monthDayClock(Date.parse(set.epochUtc))}</Cell>
                <Cell muted>{monthDayClock(Date.parse(set.inUseEpochUtc))}</Cell>
                <Cell num>{decimals(newerDays, 1)}</Cell>
                <Cell>
                  <ShiftBar seconds={set.lateSeconds} guard={guardSeconds} reach={reach} />
                </Cell>
                <Cell num strong={beyond}>
                  {set.lateSeconds === null ? '–' : signed(set.lateSeconds, 1)}
                </Cell>
                <Cell num>{decimals(set.crossTrackKm, 2)}</Cell>
              </tr>
            );
          })}
        </tbody>
      </Table>
    </Panel>
  );
}

const HALF = 56;

function ShiftBar({
  seconds,
  guard,
  reach,
}: {
  seconds: number | null;
  guard: number;
  reach: number;
}) {
  if (seconds === null) return null;
  const x = (value: number): number => (Math.max(-reach, Math.min(reach, value)) / reach) * HALF;
  const color = Math.abs(seconds) > guard ? 'var(--warn-mark)' : 'var(--ink-muted)';
  return (
    <svg
      width={HALF * 2 + 12}
      height="18"
      viewBox={`${-HALF - 6} -9 ${HALF * 2 + 12} 18`}
      aria-hidden="true"
      className="mx-auto block"
    >
      <rect x={x(-guard)} y="-8" width={x(guard) * 2} height="16" fill="var(--raised)" />
      <path
        d={`M${x(-guard)} -8V8M${x(guard)} -8V8`}
        stroke="var(--line-strong)"
        strokeDasharray="2 2"
      />
      <path d="M0 -8V8" stroke="var(--line-strong)" />
      <path d={`M0 0H${x(seconds)}`} stroke={color} strokeWidth="2.5" />
      <circle cx={x(seconds)} r="3.5" fill={color} />
    </svg>
  );
}
