import { useQuery } from '@tanstack/react-query';
import { useMemo } from 'react';
import { Link } from 'react-router-dom';
import type { Pass } from '../../../../shared/schemas/pass.ts';
import type { Station } from '../../../../shared/schemas/station.ts';
import { lookAnglesAt, type Track } from '../../../../shared/orbit/track.ts';
import type { SkyGround } from '../../../charts/sky-ground.ts';
import { SkySheet } from '../../../charts/sky-sheet.tsx';
import { IconButton } from '../../../components/button.tsx';
import { MissionMark } from '../../../components/mission-mark.tsx';
import { PassCharts } from '../../../components/pass-charts.tsx';
import { Cell, Head, RowHead, Table } from '../../../components/table.tsx';
import { useMissions } from '../../../hooks/use-missions.ts';
import { azimuth, decimals, passWords } from '../../../lib/format-number.ts';
import { clockSeconds, dateClock, minutesSeconds } from '../../../lib/format-time.ts';
import { isSecondForm, seriesColor } from '../../../lib/series.ts';
import { passQueries } from '../../../queries/pass-queries.ts';
import { stationQueries } from '../../../queries/station-queries.ts';
import { windowsOf } from '../pass-windows.ts';

interface Props {
  pass: Pass;
  station: Station;
  ground: SkyGround | null;
  onClose: () => void;
}

export function PassDetail({ pass, station, ground, onClose }: Props) {
  const missions = useMissions();
  const series = missions.series(pass.missionId);
  const color = series === null ? 'var(--ink-muted)' : seriesColor(series);
  const track = useQuery(passQueries.track(pass.id)).data ?? null;
  const faces = useQuery(stationQueries.faces(station.id)).data ?? [];
  const usable = windowsOf(pass, 'receive');
  const [fromMs, toMs] = [Date.parse(pass.aosUtc), Date.parse(pass.losUtc)];
  const tracks = useMemo(
    () =>
      track
        ? [
            {
              id: pass.id,
              fromMs,
              toMs,
              track,
              color,
              dashed: series !== null && isSecondForm(series),
              contacts: windowsOf(pass, 'receive'),
            },
          ]
        : [],
    [track, pass, fromMs, toMs, color, series],
  );
  const best = usable[0] ?? null;
  const face = faces.find(({ id }) => id === best?.faceId) ?? faces[0];
  return (
    <div className="flex flex-col gap-3 p-4.5">
      <div className="flex items-center gap-2">
        <MissionMark series={series} size={12} />
        <h2 className="text-section font-semibold">{pass.satelliteName}</h2>
        <IconButton icon="close" label="Close the pass" className="ml-auto" onClick={onClose} />
      </div>
      <p className="-mt-2 text-ink-muted">{passWords(pass)}</p>
      {ground && (
        <div className="self-center">
          <SkySheet
            ground={ground}
            radius={118}
            tracks={tracks}
            label={`Track of ${pass.satelliteName} over the station: ${passWords(pass)}`}
          />
        </div>
      )}
      <Instants pass={pass} track={track} usable={usable} />
      <PassCharts
        passId={pass.id}
        fromMs={fromMs}
        toMs={toMs}
        tcaMs={Date.parse(pass.tcaUtc)}
        faceId={face?.id ?? null}
        color={color}
        within={usable}
        elevationFloorDeg={station.receiveElevationFloorDeg}
        limitDb={face?.normalLimitDb ?? 3}
        width={330}
      />
      <Windows pass={pass} faceName={(id) => faces.find((one) => one.id === id)?.label ?? ''} />
      <p className="text-caption text-ink-muted">
        Predicted from the element set of {dateClock(Date.parse(pass.elementSetEpochUtc))} UTC.{' '}
        <Link className="link" to={`/element-sets?state=all&satellite=${pass.satelliteId}`}>
          Element sets
        </Link>
      </p>
    </div>
  );
}

function Instants({
  pass,
  track,
  usable,
}: {
  pass: Pass;
  track: Track | null;
  usable: readonly { fromMs: number; toMs: number }[];
}) {
  const [first, last] = [usable[0], usable.at(-1)];
  const rows: (readonly [word: string, ms: number, strong: boolean])[] = [
    ['AOS', Date.parse(pass.aosUtc), false],
    ...(first ? [['Usable', first.fromMs, true] as const] : []),
    ['TCA', Date.parse(pass.tcaUtc), false],
    ...(last ? [['End', last.toMs, true] as const] : []),
    ['LOS', Date.parse(pass.losUtc), false],
  ];
  return (
    <Table caption="Instants of the pass" bare>
      <thead>
        <tr>
          <Head>Instant</Head>
          <Head>UTC</Head>
          <Head num unit="deg">
            Az
          </Head>
          <Head num unit="deg">
            El
          </Head>
          <Head num unit="km">
            Range
          </Head>
        </tr>
      </thead>
      <tbody>
        {[...rows]
          .sort((a, b) => a[1] - b[1])
          .map(([word, ms, strong]) => {
            const look = track && lookAnglesAt(track, ms);
            return (
              <tr key={word}>
                <RowHead className={strong ? '' : 'font-normal! text-ink-muted'}>{word}</RowHead>
                <Cell strong={strong}>{clockSeconds(ms)}</Cell>
                <Cell num>{look ? azimuth(look.azimuthDeg) : '–'}</Cell>
                <Cell num>{decimals(look?.elevationDeg, 1)}</Cell>
                <Cell num>{look ? Math.round(look.rangeKm) : '–'}</Cell>
              </tr>
            );
          })}
      </tbody>
    </Table>
  );
}

function Windows({ pass, faceName }: { pass: Pass; faceName: (id: string) => string }) {
  if (pass.windows.length === 0)
    return (
      <p className="text-ink-muted">
        No face can serve this pass within its scan-loss limit, the mask and the elevation floor.
      </p>
    );
  return (
    <Table caption="Usable windows" bare>
      <thead>
        <tr>
          <Head>Usable window</Head>
          <Head>From</Head>
          <Head>To</Head>
          <Head num unit="min">
            Lasts
          </Head>
          <Head num unit="dB">
            Loss
          </Head>
        </tr>
      </thead>
      <tbody>
        {(['receive', 'transmit'] as const).flatMap((direction) =>
          windowsOf(pass, direction).map((window) => (
            <tr key={`${direction} ${window.faceId} ${window.fromMs}`}>
              <Cell>
                {direction === 'receive' ? 'Receive' : 'Transmit'}, {faceName(window.faceId)}
              </Cell>
              <Cell>{clockSeconds(window.fromMs)}</Cell>
              <Cell>{clockSeconds(window.toMs)}</Cell>
              <Cell num>{minutesSeconds(window.toMs - window.fromMs)}</Cell>
              <Cell num>
                {decimals(window.minScanLossDb, 1)}–{decimals(window.maxScanLossDb, 1)}
              </Cell>
            </tr>
          )),
        )}
      </tbody>
    </Table>
  );
}
