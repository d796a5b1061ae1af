import { scaleLinear } from 'd3-scale';
import { useId, useMemo } from 'react';
import type { Interval } from '../../shared/time.ts';
import { clockMinutes } from '../lib/format-time.ts';
import { HatchPattern } from './hatch.tsx';
import { LoadBrush } from './load-brush.tsx';
import type { LoadLeg } from './load-counts.ts';
import { HourRules, LOAD_LEFT, LOAD_RIGHT, NowLine, frameOf } from './load-frame.tsx';
import { Side, SideWords, sideOf, type LoadChannel, type LoadSide } from './load-side.tsx';

interface Props {
  span: Interval;
  legs: readonly LoadLeg[];
  channels: readonly LoadChannel[];
  width: number;
  height?: number;
  brush?: Interval | null;
  onBrush?: (brush: Interval, done: boolean) => void;
  instantMs?: number | null;
  onInstant?: (ms: number, done: boolean) => void;
  nowMs?: number | null;
}

/** Beams in use against beam channels over the day: receive grows upward, transmit downward. */
export function LoadLine(props: Props) {
  const { span, legs, channels, width, height = 104 } = props;
  const hatch = useId();
  const data = useMemo(
    () => ({
      receive: sideOf('receive', legs, channels, span),
      transmit: sideOf('transmit', legs, channels, span),
    }),
    [legs, channels, span],
  );
  const x = scaleLinear([span.fromMs, span.toMs], [LOAD_LEFT, width - LOAD_RIGHT]);
  const frame = frameOf(height, data.receive.count, data.transmit.count);
  const right = width - LOAD_RIGHT;
  return (
    <svg
      width={width}
      height={height}
      className="figures block select-none"
      role="group"
      aria-label={wordsOf(data)}
    >
      <defs>
        <HatchPattern id={hatch} />
      </defs>
      <rect
        x={LOAD_LEFT}
        y={frame.top}
        width={right - LOAD_LEFT}
        height={frame.bottom - frame.top}
        fill="var(--sheet)"
      />
      <HourRules span={span} x={x} frame={frame} />
      <Side
        side={data.receive}
        x={x}
        base={frame.receiveBase}
        unit={-frame.receiveUnit}
        hatch={hatch}
        span={span}
      />
      {data.transmit.count > 0 && (
        <Side
          side={data.transmit}
          x={x}
          base={frame.transmitBase}
          unit={frame.transmitUnit}
          hatch={hatch}
          span={span}
        />
      )}
      <SideWords data={data} frame={frame} right={right} />
      {props.nowMs !== null && props.nowMs !== undefined && (
        <NowLine nowMs={props.nowMs} span={span} x={x} frame={frame} />
      )}
      {(props.onBrush ?? props.onInstant) && (
        <LoadBrush
          span={span}
          left={LOAD_LEFT}
          right={right}
          top={frame.top - 4}
          bottom={frame.bottom + 4}
          brush={props.brush ?? null}
          instantMs={props.instantMs ?? null}
          {...(props.onBrush ? { onBrush: props.onBrush } : {})}
          {...(props.onInstant ? { onInstant: props.onInstant } : {})}
        />
      )}
    </svg>
  );
}

const wordsOf = ({ receive, transmit }: { receive: LoadSide; transmit: LoadSide }): string => {
  const of = (side: LoadSide, word: string): string =>
    side.load.mostAtMs === null
      ? `no ${word} beam in use`
      : `at most ${side.load.most} of ${side.count} ${word} channels in use, at ${clockMinutes(side.load.mostAtMs)} UTC`;
  return `Load of the day: ${of(receive, 'receive')}; ${of(transmit, 'transmit')}`;
};
