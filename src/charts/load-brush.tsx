import { useRef, type KeyboardEvent, type PointerEvent } from 'react';
import { MINUTE_MS, type Interval } from '../../shared/time.ts';
import { clockMinutes, clockSeconds } from '../lib/format-time.ts';

interface Props {
  span: Interval;
  left: number;
  right: number;
  top: number;
  bottom: number;
  brush: Interval | null;
  onBrush?: (brush: Interval, done: boolean) => void;
  instantMs: number | null;
  onInstant?: (ms: number, done: boolean) => void;
}

type Grip = 'from' | 'to' | 'all' | 'instant';
interface Drag {
  grip: Grip;
  startMs: number;
  before: Interval;
}

export const LEAST_BRUSH_MS = 30 * MINUTE_MS;
const GRIP_PX = 7;

/** A brush keeps its least length and stays in the span. */
export function fitBrush(brush: Interval, span: Interval, moved: Grip = 'all'): Interval {
  const length = Math.max(
    LEAST_BRUSH_MS,
    Math.min(brush.toMs - brush.fromMs, span.toMs - span.fromMs),
  );
  let fromMs = moved === 'from' ? brush.toMs - length : brush.fromMs;
  fromMs = Math.max(span.fromMs, Math.min(fromMs, span.toMs - length));
  return { fromMs, toMs: fromMs + length };
}

/** Pointer and keys on the load line: a stretch for the calendar, an instant for the sky. */
export function LoadBrush(props: Props) {
  const { span, left, right, top, bottom, brush, onBrush, instantMs, onInstant } = props;
  const drag = useRef<Drag | null>(null);
  const scale = (right - left) / (span.toMs - span.fromMs);
  const x = (ms: number): number => left + (ms - span.fromMs) * scale;
  const msAt = (event: PointerEvent<SVGElement>): number => {
    const box = event.currentTarget.getBoundingClientRect();
    const ms = span.fromMs + (event.clientX - box.left) / scale;
    return Math.max(span.fromMs, Math.min(span.toMs, ms));
  };
  const gripAt = (ms: number): Grip => {
    if (!onBrush || !brush) return 'instant';
    if (Math.abs(x(ms) - x(brush.fromMs)) < GRIP_PX) return 'from';
    if (Math.abs(x(ms) - x(brush.toMs)) < GRIP_PX) return 'to';
    return 'all';
  };
  const begin = (event: PointerEvent<SVGElement>): void => {
    event.currentTarget.setPointerCapture(event.pointerId);
    const ms = msAt(event);
    const grip = gripAt(ms);
    if (grip === 'instant' || !brush) {
      drag.current = { grip: 'instant', startMs: ms, before: span };
      onInstant?.(ms, false);
      return;
    }
    let before = brush;
    if (grip === 'all' && (ms < brush.fromMs || ms > brush.toMs)) {
      // A press elsewhere brings the stretch there.
      const half = (brush.toMs - brush.fromMs) / 2;
      before = fitBrush({ fromMs: ms - half, toMs: ms + half }, span);
      onBrush?.(before, false);
    }
    drag.current = { grip, startMs: ms, before };
  };
  const movedTo = (event: PointerEvent<SVGElement>): void => {
    const now = drag.current;
    if (!now) return;
    const ms = msAt(event);
    if (now.grip === 'instant') return onInstant?.(ms, false);
    onBrush?.(draggedBrush(now, ms, span), false);
  };
  const end = (event: PointerEvent<SVGElement>): void => {
    const now = drag.current;
    drag.current = null;
    if (!now) return;
    const ms = msAt(event);
    if (now.grip === 'instant') onInstant?.(ms, true);
    else onBrush?.(draggedBrush(now, ms, span), true);
  };
  return (
    <g>
      {brush && (
        <rect
          x={x(brush.fromMs)}
          y={top}
          width={x(brush.toMs) - x(brush.fromMs)}
          height={bottom - top}
          rx="2"
          fill="var(--accent)"
          fillOpacity="0.1"
          stroke="var(--accent)"
          strokeWidth="1.5"
        />
      )}
      {instantMs !== null && (
        <g>
          <path d={`M${x(instantMs)} ${top}V${bottom}`} stroke="var(--accent)" strokeWidth="2" />
          <circle cx={x(instantMs)} cy={top} r="5" fill="var(--accent)" />
        </g>
      )}
      <rect
        x={left}
        y={top - 4}
        width={right - left}
        height={bottom - top + 8}
        fill="transparent"
        style={{ cursor: onBrush ? 'ew-resize' : 'crosshair', touchAction: 'none' }}
        onPointerDown={begin}
        onPointerMove={movedTo}
        onPointerUp={end}
        onPointerCancel={end}
      />
      {brush && onBrush && (
        <>
          <Handle
            grip="from"
            brush={brush}
            span={span}
            x={x}
            top={top}
            bottom={bottom}
            onBrush={onBrush}
          />
          <Handle
            grip="to"
            brush={brush}
            span={span}
            x={x}
            top={top}
            bottom={bottom}
            onBrush={onBrush}
          />
        </>
      )}
      {instantMs !== null && onInstant && (
        <InstantKnob ms={instantMs} span={span} x={x(instantMs)} y={top} onInstant={onInstant} />
      )}
    </g>
  );
}

const snap = (ms: number): number => Math.round(ms / MINUTE_MS) * MINUTE_MS;

function draggedBrush({ grip, startMs, before }: Drag, ms: number, span: Interval): Interval {
  const by = ms - startMs;
  if (grip === 'all') {
    return fitBrush({ fromMs: snap(before.fromMs + by), toMs: snap(before.toMs + by) }, span);
  }
  const changed = { ...before, [grip === 'from' ? 'fromMs' : 'toMs']: snap(ms) };
  return fitBrush(changed, span, grip);
}

interface HandleProps {
  grip: 'from' | 'to';
  brush: Interval;
  span: Interval;
  x: (ms: number) => number;
  top: number;
  bottom: number;
  onBrush: (brush: Interval, done: boolean) => void;
}

const STEPS: Record<string, number> = {
  ArrowLeft: -1,
  ArrowDown: -1,
  ArrowRight: 1,
  ArrowUp: 1,
  PageDown: -30,
  PageUp: 30,
};

/** One end of the stretch: arrows move it by 5 minutes, with Shift both ends together. */
function Handle({ grip, brush, span, x, top, bottom, onBrush }: HandleProps) {
  const ms = grip === 'from' ? brush.fromMs : brush.toMs;
  const keys = (event: KeyboardEvent): void => {
    const step = STEPS[event.key];
    if (step === undefined) return;
    event.preventDefault();
    const by = step * 5 * MINUTE_MS;
    if (event.shiftKey)
      onBrush(fitBrush({ fromMs: brush.fromMs + by, toMs: brush.toMs + by }, span), true);
    else
      onBrush(
        fitBrush({ ...brush, [grip === 'from' ? 'fromMs' : 'toMs']: ms + by }, span, grip),
        true,
      );
  };
  return (
    <rect
      role="slider"
      tabIndex={0}
      aria-label={grip === 'from' ? 'Beginning of the stretch' : 'End of the stretch'}
      aria-orientation="horizontal"
      aria-valuemin={0}
      aria-valuemax={(span.toMs - span.fromMs) / MINUTE_MS}
      aria-valuenow={(ms - span.fromMs) / MINUTE_MS}
      aria-valuetext={`${clockMinutes(ms)} UTC`}
      onKeyDown={keys}
      x={x(ms) - 2.5}
      y={top + (bottom - top) * 0.24}
      width="5"
      height={(bottom - top) * 0.2}
      rx="2.5"
      fill="var(--accent)"
      pointerEvents="none"
    />
  );
}

interface KnobProps {
  ms: number;
  span: Interval;
  x: number;
  y: number;
  onInstant: (ms: number, done: boolean) => void;
}

/** The instant: arrows move it by a second, with Shift by a minute. */
function InstantKnob({ ms, span, x, y, onInstant }: KnobProps) {
  const keys = (event: KeyboardEvent): void => {
    const step = STEPS[event.key];
    if (step === undefined) return;
    event.preventDefault();
    const next = ms + step * (event.shiftKey ? MINUTE_MS : 1000);
    onInstant(Math.max(span.fromMs, Math.min(span.toMs, next)), true);
  };
  return (
    <circle
      role="slider"
      tabIndex={0}
      aria-label="Instant"
      aria-orientation="horizontal"
      aria-valuemin={0}
      aria-valuemax={(span.toMs - span.fromMs) / 1000}
      aria-valuenow={Math.round((ms - span.fromMs) / 1000)}
      aria-valuetext={`${clockSeconds(ms)} UTC`}
      onKeyDown={keys}
      cx={x}
      cy={y}
      r="5"
      fill="var(--accent)"
      pointerEvents="none"
    />
  );
}
