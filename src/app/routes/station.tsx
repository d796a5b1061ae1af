import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { useParams } from 'react-router-dom';
import { Button } from '../../components/button.tsx';
import { PageBody, PageHead } from '../../components/page-head.tsx';
import { Panel } from '../../components/panel.tsx';
import { QueryView } from '../../components/query-view.tsx';
import { ErrorState } from '../../components/states.tsx';
import { ChannelPanel } from '../../features/stations/components/channel-panel.tsx';
import { ClosurePanel } from '../../features/stations/components/closure-panel.tsx';
import { FaceFiguresPanel } from '../../features/stations/components/face-figures-panel.tsx';
import { FacePanel } from '../../features/stations/components/face-panel.tsx';
import { InhibitBar } from '../../components/inhibit-bar.tsx';
import { StationDialog } from '../../features/stations/components/station-dialog.tsx';
import { StationFacts } from '../../features/stations/components/station-facts.tsx';
import { SkySheet } from '../../charts/sky-sheet.tsx';
import { useMay } from '../../hooks/use-session.ts';
import { useSkyGround } from '../../hooks/use-sky-ground.ts';
import { useTitle } from '../../hooks/use-title.ts';
import { ApiError } from '../../lib/api-error.ts';
import { decimals } from '../../lib/format-number.ts';
import { stationQueries } from '../../queries/station-queries.ts';

const unknownStation = new ApiError({
  type: 'about:blank',
  title: 'Not found',
  status: 404,
  code: 'not-found',
  detail: 'The station does not exist.',
});

export function Component() {
  const { id = '' } = useParams();
  const { may } = useMay();
  const stations = useQuery(stationQueries.list());
  const station = stations.data?.find((one) => one.id === id);
  const ground = useSkyGround(station ? id : null, null);
  const [editing, setEditing] = useState(false);
  useTitle(station?.name ?? 'Station');
  return (
    <>
      <PageHead
        title={station?.name ?? 'Station'}
        aside={
          station &&
          `${decimals(station.latitudeDeg, 3)}°, ${decimals(station.longitudeDeg, 3)}°, ${decimals(station.heightM, 0)} m, ${station.timeZone}`
        }
        actions={
          station &&
          may('edit.stations') && (
            <Button icon="pencil" onClick={() => setEditing(true)}>
              Change the station
            </Button>
          )
        }
      />
      <PageBody>
        <QueryView query={stations} what="This station">
          {() =>
            station ? (
              <>
                <InhibitBar station={station} />
                <div className="grid items-start gap-3.5 xl:grid-cols-[minmax(0,1fr)_30rem]">
                  <div className="flex min-w-0 flex-col gap-3.5">
                    <StationFacts station={station} />
                    <FacePanel station={station} />
                    <FaceFiguresPanel station={station} />
                    <ChannelPanel station={station} />
                    <ClosurePanel station={station} />
                  </div>
                  <Panel title="The sky" aside="mask, keep-out sectors, scan loss of each face">
                    <div className="flex justify-center">
                      {ground && (
                        <SkySheet
                          ground={ground}
                          radius={190}
                          label={`Sky over ${station.name}: horizon mask, keep-out sectors and scan-loss contours`}
                        />
                      )}
                    </div>
                  </Panel>
                </div>
                {editing && <StationDialog station={station} onClose={() => setEditing(false)} />}
              </>
            ) : (
              <ErrorState error={unknownStation} what="This station" />
            )
          }
        </QueryView>
      </PageBody>
    </>
  );
}
