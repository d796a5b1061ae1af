import { useQueries, useQuery } from '@tanstack/react-query';
import { useMemo } from 'react';
import type { Contact, Plan } from '../../../../shared/schemas/plan.ts';
import { dayInterval, toIso } from '../../../../shared/time.ts';
import { SkySheet } from '../../../charts/sky-sheet.tsx';
import type { SkyTrack } from '../../../charts/track-path.ts';
import { Panel } from '../../../components/panel.tsx';
import { useMissions } from '../../../hooks/use-missions.ts';
import { useSkyGround } from '../../../hooks/use-sky-ground.ts';
import { counted } from '../../../lib/format-number.ts';
import { isSecondForm, seriesColor } from '../../../lib/series.ts';
import { passQueries } from '../../../queries/pass-queries.ts';

interface Props {
  plan: Plan;
  contacts: readonly Contact[];
  /** The contact of the row in hand stands out. */
  followedId: string | null;
}

/** The mission's whole day on one sky sheet. */
export function DaySky({ plan, contacts, followedId }: Props) {
  const ground = useSkyGround(plan.stationId, plan.limitOfDayDb);
  const tracks = useDayTracks(plan, contacts);
  const followed = contacts.find(({ id }) => id === followedId)?.passId ?? null;
  if (contacts.length === 0) return null;
  return (
    <Panel title="Your day on the sky" aside="solid: contact">
      {ground && (
        <div className="flex justify-center">
          <SkySheet
            ground={ground}
            radius={138}
            tracks={tracks}
            followed={followed}
            label={`${counted(contacts.length, 'contact')} of the mission on the sky over the station`}
          />
        </div>
      )}
    </Panel>
  );
}

function useDayTracks(plan: Plan, contacts: readonly Contact[]): SkyTrack[] {
  const missions = useMissions();
  const { fromMs, toMs } = dayInterval(plan.day);
  const passes = useQuery(
    passQueries.list({ stationId: plan.stationId, fromUtc: toIso(fromMs), toUtc: toIso(toMs) }),
  ).data;
  const ids = useMemo(() => [...new Set(contacts.map(({ passId }) => passId))], [contacts]);
  const tracks = useQueries({
    queries: ids.map((id) => passQueries.track(id)),
    combine: (results) => results.map(({ data }) => data),
  });
  return useMemo(
    () =>
      ids.flatMap((id, index): SkyTrack[] => {
        const track = tracks[index];
        const pass = passes?.find((one) => one.id === id);
        if (!track || !pass) return [];
        const series = missions.series(pass.missionId);
        return [
          {
            id,
            track,
            fromMs: Date.parse(pass.aosUtc),
            toMs: Date.parse(pass.losUtc),
            color: series === null ? null : seriesColor(series),
            dashed: series !== null && isSecondForm(series),
            contacts: contacts
              .filter(({ passId }) => passId === id)
              .map(({ receive }) => ({
                fromMs: Date.parse(receive.fromUtc),
                toMs: Date.parse(receive.toUtc),
              })),
          },
        ];
      }),
    [ids, tracks, passes, contacts, missions],
  );
}
