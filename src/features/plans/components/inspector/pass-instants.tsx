import { useQuery } from '@tanstack/react-query';
import { lookAnglesAt } from '../../../../../shared/orbit/track.ts';
import type { Interval } from '../../../../../shared/time.ts';
import { PassThumb } from '../../../../components/pass-thumb.tsx';
import { azimuth, degrees } from '../../../../lib/format-number.ts';
import { clockSeconds } from '../../../../lib/format-time.ts';
import { passQueries } from '../../../../queries/pass-queries.ts';
import { usePlanDesk } from '../../hooks/plan-desk.ts';

interface Props extends Interval {
  passId: string;
  tcaMs: number;
  missionId: string;
  /** The part that is used, shown strong. */
  used: Interval | null;
  usedWord: string;
}

/** Where the satellite is at the instants that matter, beside its track. */
export function PassInstants({ passId, fromMs, toMs, tcaMs, missionId, used, usedWord }: Props) {
  const { ground, missions } = usePlanDesk();
  const track = useQuery(passQueries.track(passId)).data;
  const rows = [
    { word: 'AOS', ms: fromMs, strong: false },
    { word: 'TCA', ms: tcaMs, strong: false },
    { word: 'LOS', ms: toMs, strong: false },
    ...(used
      ? [
          { word: usedWord, ms: used.fromMs, strong: true },
          { word: 'End', ms: used.toMs, strong: true },
        ]
      : []),
  ].sort((a, b) => a.ms - b.ms);
  return (
    <div className="flex items-center gap-3">
      <PassThumb
        ground={ground}
        passId={passId}
        series={missions.series(missionId)}
        fromMs={fromMs}
        toMs={toMs}
        {...(used ? { contacts: [used] } : {})}
        size={118}
      />
      <table className="min-w-0 flex-1 text-table">
        <caption className="sr-only">Instants of the pass</caption>
        <thead>
          <tr className="text-caption text-ink-muted">
            <th scope="col" className="sr-only">
              Instant
            </th>
            <th scope="col" className="text-right font-normal">
              UTC
            </th>
            <th scope="col" className="pl-2 text-right font-normal">
              az
            </th>
            <th scope="col" className="pl-2 text-right font-normal">
              el
            </th>
          </tr>
        </thead>
        <tbody>
          {rows.map(({ word, ms, strong }) => {
            const look = track && lookAnglesAt(track, ms);
            return (
              <tr key={word} className={strong ? 'font-semibold' : 'text-ink-muted'}>
                <th scope="row" className="py-0.5 text-left font-[inherit]">
                  {word}
                </th>
                <td className="text-right text-ink">{clockSeconds(ms)}</td>
                <td className="pl-2 text-right">{look ? azimuth(look.azimuthDeg) : '–'}</td>
                <td className="pl-2 text-right">
                  {look ? degrees(look.elevationDeg).slice(0, -1) : '–'}
                </td>
              </tr>
            );
          })}
        </tbody>
      </table>
    </div>
  );
}
