import { HOUR_MS, type Interval } from '../../shared/time.ts';
import { clockMinutes } from '../lib/format-time.ts';

/** Margins of the load line: words at the left, capacity and the busiest minute at the right. */
export const LOAD_LEFT = 84;
export const LOAD_RIGHT = 116;

/** From an instant to px. */
export type Scale = (ms: number) => number;

export interface Frame {
  top: number;
  bottom: number;
  receiveBase: number;
  receiveUnit: number;
  transmitBase: number;
  transmitUnit: number;
}

/** The two base lines share the height by their channels, transmit never below a third. */
export function frameOf(height: number, receive: number, transmit: number): Frame {
  const [top, bottom] = [8, height - 22];
  const room = bottom - top - 4;
  const share = transmit === 0 ? 0 : Math.max(0.3, Math.min(0.4, transmit / (receive + transmit)));
  const receiveHeight = room * (1 - share);
  return {
    top,
    bottom,
    receiveBase: top + receiveHeight,
    receiveUnit: receive === 0 ? 0 : receiveHeight / receive,
    transmitBase: top + receiveHeight + 4,
    transmitUnit: transmit === 0 ? 0 : (room * share) / transmit,
  };
}

export function HourRules({ span, x, frame }: { span: Interval; x: Scale; frame: Frame }) {
  const hours: number[] = [];
  for (let ms = Math.ceil(span.fromMs / HOUR_MS) * HOUR_MS; ms <= span.toMs; ms += HOUR_MS)
    hours.push(ms);
  // Three hours a label where there is room for them.
  const pxPerHour = x(span.fromMs + HOUR_MS) - x(span.fromMs);
  const step = pxPerHour > 17 ? 3 : pxPerHour > 8 ? 6 : 12;
  const isLabelled = (ms: number): boolean => ((ms - span.fromMs) / HOUR_MS) % step === 0;
  return (
    <g>
      {hours.map((ms) => (
        <g key={ms}>
          <path
            d={`M${x(ms)} ${frame.top}V${frame.bottom}`}
            stroke={isLabelled(ms) ? 'var(--line)' : 'var(--line-soft)'}
          />
          {isLabelled(ms) && (
            <text
              x={x(ms)}
              y={frame.bottom + 16}
              fontSize="12"
              textAnchor="middle"
              fill="var(--ink-muted)"
            >
              {ms === span.toMs ? '24:00' : clockMinutes(ms)}
            </text>
          )}
        </g>
      ))}
    </g>
  );
}

export function NowLine({
  nowMs,
  span,
  x,
  frame,
}: {
  nowMs: number;
  span: Interval;
  x: Scale;
  frame: Frame;
}) {
  if (nowMs < span.fromMs || nowMs > span.toMs) return null;
  const past = x(nowMs) - LOAD_LEFT;
  return (
    <g>
      <rect
        x={LOAD_LEFT}
        y={frame.top}
        width={Math.max(0, past)}
        height={frame.bottom - frame.top}
        fill="var(--surface)"
        opacity="0.45"
      />
      <path
        d={`M${x(nowMs)} ${frame.top - 3}V${frame.bottom + 3}`}
        stroke="var(--danger-mark)"
        strokeWidth="1.75"
      />
    </g>
  );
}
