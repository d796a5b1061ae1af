import { useQuery } from '@tanstack/react-query';
import { useMemo } from 'react';
import type { Interval } from '../../shared/time.ts';
import type { z } from 'zod';
import type { TrackPoint } from '../../shared/schemas/pass.ts';
import { StripChart, type StripPoint } from '../charts/strip-chart.tsx';
import { clockMinutes } from '../lib/format-time.ts';
import { decimals } from '../lib/format-number.ts';
import { passQueries } from '../queries/pass-queries.ts';
import { QueryView } from './query-view.tsx';
import { Skeleton } from './states.tsx';

interface Props extends Interval {
  passId: string;
  tcaMs: number;
  faceId: string | null;
  color: string;
  /** What is used (contacts) or usable (windows); the rest is shaded. */
  within: readonly Interval[] | null;
  elevationFloorDeg: number;
  limitDb: number;
  marginFloorDb?: number | null;
  instantMs?: number | null;
  width: number;
}
type Point = z.infer<typeof TrackPoint>;

const nice = (value: number, step: number): number =>
  Math.max(step, Math.ceil(value / step) * step);

/** Elevation, scan loss and, where it is known, link margin of one pass on one axis from AOS to LOS. */
export function PassCharts(props: Props) {
  const points = useQuery(passQueries.points(props.passId));
  return (
    <QueryView query={points} what="The track of this pass" skeleton={<Skeleton rows={3} />}>
      {(data) => <Charts {...props} points={data} />}
    </QueryView>
  );
}

function Charts({ points, faceId, ...props }: Props & { points: readonly Point[] }) {
  const { fromMs, toMs, tcaMs, color, within, width } = props;
  const { elevation, loss, margin } = useMemo(() => quantities(points, faceId), [points, faceId]);
  const hasMargin = margin.some(({ value }) => value !== null);
  const marks = [
    { ms: fromMs, word: `AOS ${clockMinutes(fromMs)}` },
    { ms: tcaMs, word: `TCA ${clockMinutes(tcaMs)}` },
    { ms: toMs, word: `LOS ${clockMinutes(toMs)}` },
  ];
  const common = { fromMs, toMs, color, within, width, instantMs: props.instantMs ?? null };
  return (
    <div className="flex flex-col gap-0.5">
      <StripChart
        {...common}
        title="Elevation"
        unit="deg"
        points={elevation}
        domain={[0, nice(most(elevation), 10)]}
        limit={{ value: props.elevationFloorDeg, words: `min ${props.elevationFloorDeg}°` }}
        best={`most ${decimals(most(elevation), 1)}`}
      />
      <StripChart
        {...common}
        title="Scan loss"
        unit="dB"
        points={loss}
        domain={[0, nice(Math.max(props.limitDb + 1, 5), 1)]}
        limit={{ value: props.limitDb, words: `limit ${decimals(props.limitDb, 1)}` }}
        best={`best ${decimals(least(loss), 1)}`}
        {...(hasMargin ? {} : { marks })}
      />
      {hasMargin && (
        <StripChart
          {...common}
          title="Link margin"
          unit="dB"
          points={margin}
          domain={[Math.min(0, Math.floor(least(margin))), nice(most(margin), 4)]}
          limit={
            props.marginFloorDb === null || props.marginFloorDb === undefined
              ? null
              : { value: props.marginFloorDb, words: `floor ${decimals(props.marginFloorDb, 1)}` }
          }
          best={`most ${decimals(most(margin), 1)}`}
          marks={marks}
        />
      )}
    </div>
  );
}

const values = (points: readonly StripPoint[]): number[] =>
  points.flatMap(({ value }) => (value === null ? [] : [value]));
const most = (points: readonly StripPoint[]): number => Math.max(0, ...values(points));
const least = (points: readonly StripPoint[]): number => {
  const all = values(points);
  return all.length > 0 ? Math.min(...all) : NaN;
};

function quantities(points: readonly Point[], faceId: string | null) {
  const of = (value: (point: Point) => number | null): StripPoint[] =>
    points.map((point) => ({ ms: Date.parse(point.atUtc), value: value(point) }));
  const face = (point: Point) =>
    point.faces.find((one) => faceId === null || one.faceId === faceId) ?? null;
  return {
    elevation: of(({ elevationDeg }) => elevationDeg),
    loss: of((point) => face(point)?.scanLossDb ?? null),
    margin: of((point) => face(point)?.marginDb ?? null),
  };
}
