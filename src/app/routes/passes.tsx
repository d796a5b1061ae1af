import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { z } from 'zod';
import { Day } from '../../../shared/schemas/common.ts';
import { dayInterval, dayOf, MINUTE_MS, toIso } from '../../../shared/time.ts';
import { Button } from '../../components/button.tsx';
import { DayField } from '../../components/day-field.tsx';
import { FilterSelect, FilterText } from '../../components/filter-fields.tsx';
import { PageBody, PageHead } from '../../components/page-head.tsx';
import { Panel } from '../../components/panel.tsx';
import { QueryView } from '../../components/query-view.tsx';
import { Segmented } from '../../components/segmented.tsx';
import { EmptyState } from '../../components/states.tsx';
import { PassDetail } from '../../features/passes/components/pass-detail.tsx';
import { PassTable } from '../../features/passes/components/pass-table.tsx';
import { PredictDialog } from '../../features/passes/components/predict-dialog.tsx';
import { useMissions } from '../../hooks/use-missions.ts';
import { useNow } from '../../hooks/use-now.ts';
import { useMay } from '../../hooks/use-session.ts';
import { useSkyGround } from '../../hooks/use-sky-ground.ts';
import { useStation } from '../../hooks/use-station.ts';
import { useTitle } from '../../hooks/use-title.ts';
import { useUrlState } from '../../hooks/use-url-state.ts';
import { counted } from '../../lib/format-number.ts';
import { longDay, nextDay } from '../../lib/format-time.ts';
import { passQueries } from '../../queries/pass-queries.ts';
import { satelliteQueries } from '../../queries/satellite-queries.ts';

const SHAPE = {
  day: Day.optional(),
  days: z.enum(['1', '2', '3', '7']).default('1'),
  mission: z.uuid().optional(),
  satellite: z.uuid().optional(),
  minEl: z.coerce.number().min(0).max(90).optional(),
  rows: z.enum(['words', 'sky']).default('words'),
  pass: z.uuid().optional(),
};

export function Component() {
  useTitle('Passes');
  const { may } = useMay();
  const { station } = useStation();
  const [url, setUrl] = useUrlState(SHAPE);
  const today = dayOf(useNow(MINUTE_MS));
  const day = url.day ?? today;
  const days = Number(url.days);
  const ground = useSkyGround(station?.id ?? null, null);
  const [predicting, setPredicting] = useState(false);
  const passes = useQuery({
    ...passQueries.list({
      stationId: station?.id ?? '',
      fromUtc: toIso(dayInterval(day).fromMs),
      toUtc: toIso(dayInterval(nextDay(day, days - 1)).toMs),
      satelliteId: url.satellite,
      missionId: url.mission,
      minElevationDeg: url.minEl,
    }),
    enabled: station !== null,
  });
  const chosen = passes.data?.find(({ id }) => id === url.pass) ?? null;
  const predict = may('run.predictions') && station && (
    <Button icon="redo" onClick={() => setPredicting(true)}>
      Predict again
    </Button>
  );
  return (
    <>
      <PageHead
        title="Passes"
        aside={
          <>
            {longDay(day)}
            {days > 1 && ` and ${counted(days - 1, 'day')} after it`}
            {station && `, over ${station.name}`}
            {passes.data && `, ${counted(passes.data.length, 'pass', 'passes')}`}
          </>
        }
        actions={predict}
      />
      <div className="flex flex-1 flex-col drawer:flex-row">
        <PageBody className="min-w-0">
          <Panel
            title={<span className="sr-only">List of passes</span>}
            flush
            aside={<Filters url={url} setUrl={setUrl} day={day} />}
            actions={
              <Segmented
                label="Rows"
                size="small"
                value={url.rows}
                onChange={(rows) => setUrl({ rows: rows === 'words' ? null : rows })}
                options={[
                  { value: 'words', label: 'Compact' },
                  { value: 'sky', label: 'With sky' },
                ]}
              />
            }
          >
            <QueryView
              query={passes}
              what="The passes"
              isEmpty={(data) => data.length === 0}
              empty={
                <EmptyState icon="outside" title="No pass in this selection" action={predict}>
                  Passes are predicted from one day before now to ten days after, for satellites
                  with an element set in use.
                </EmptyState>
              }
            >
              {(data) => (
                <PassTable
                  passes={data}
                  ground={ground}
                  tall={url.rows === 'sky'}
                  withDay={days > 1}
                  chosenId={url.pass ?? null}
                  onChoose={(pass) => setUrl({ pass })}
                />
              )}
            </QueryView>
          </Panel>
        </PageBody>
        {chosen && station && (
          <aside
            aria-label={`Pass of ${chosen.satelliteName}`}
            className="border-line bg-surface drawer:sticky drawer:top-13 drawer:max-h-[calc(100dvh-3.25rem)] drawer:w-92 drawer:self-start drawer:overflow-y-auto drawer:border-l"
          >
            <PassDetail
              key={chosen.id}
              pass={chosen}
              station={station}
              ground={ground}
              onClose={() => setUrl({ pass: null })}
            />
          </aside>
        )}
      </div>
      {station && (
        <PredictDialog
          stationId={station.id}
          day={day}
          open={predicting}
          onClose={() => setPredicting(false)}
        />
      )}
    </>
  );
}

type UrlState = ReturnType<typeof useUrlState<typeof SHAPE>>;

function Filters({ url, setUrl, day }: { url: UrlState[0]; setUrl: UrlState[1]; day: string }) {
  const missions = useMissions();
  const satellites = useQuery(satelliteQueries.list()).data ?? [];
  return (
    <div className="flex flex-wrap items-center gap-x-4 gap-y-1.5">
      <DayField label="Day" value={day} onChange={(value) => setUrl({ day: value, pass: null })} />
      <FilterSelect
        label="Days"
        all="1"
        value={url.days === '1' ? '' : url.days}
        onChange={(value) => setUrl({ days: value, pass: null })}
        options={['2', '3', '7'].map((value) => [value, value] as const)}
      />
      <FilterSelect
        label="Mission"
        value={url.mission ?? ''}
        onChange={(mission) => setUrl({ mission, satellite: null })}
        options={missions.list.map(({ id, name }) => [id, name] as const)}
      />
      <FilterSelect
        label="Satellite"
        value={url.satellite ?? ''}
        onChange={(satellite) => setUrl({ satellite })}
        options={satellites
          .filter((one) => !url.mission || one.missionId === url.mission)
          .map(({ id, name }) => [id, name] as const)}
      />
      <FilterText
        label="At least"
        type="number"
        width="w-16!"
        unit="deg high"
        value={url.minEl === undefined ? '' : String(url.minEl)}
        onChange={(minEl) => setUrl({ minEl })}
      />
    </div>
  );
}
