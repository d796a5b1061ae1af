import { useEffect, useRef, useState } from 'react';
import { MINUTE_MS } from '../../../../../shared/time.ts';
import { Button, IconButton } from '../../../../components/button.tsx';
import { clockSeconds } from '../../../../lib/format-time.ts';
import { usePlanDesk } from '../../hooks/plan-desk.ts';
import { usePlanView } from '../../hooks/plan-view.ts';
import { PlanLoadLine } from '../plan-load-line.tsx';

/** A minute of the day in a second. */
const SPEED = 60;

/** The scrubber of sky and map: steps from one AOS or LOS to the next, and plays through the day. */
export function InstantBar() {
  const { instantMs, setInstant } = usePlanView();
  const [playing, setPlaying] = usePlay();
  const { next, before } = useEvents();
  const keys = (event: React.KeyboardEvent): void => {
    if (event.target instanceof SVGElement) return;
    const step = { ArrowLeft: -1, ArrowRight: 1 }[event.key];
    if (step === undefined) return;
    event.preventDefault();
    if (event.shiftKey) setInstant((step > 0 ? next : before) ?? instantMs, true);
    else setInstant(instantMs + step * MINUTE_MS, true);
  };
  return (
    <div
      className="grid items-center border-t border-line bg-surface py-2 narrow:grid-cols-[13.5rem_minmax(0,1fr)]"
      onKeyDown={keys}
    >
      <div className="pl-5">
        <p className="figures flex items-baseline gap-2">
          <span className="text-page font-medium">{clockSeconds(instantMs)}</span>
          <span className="text-caption font-semibold">UTC</span>
        </p>
        <div role="toolbar" aria-label="Instant" className="mt-1.5 flex items-center gap-1.5">
          <IconButton
            variant="outline"
            icon="chevronLeft"
            label="To the AOS or LOS before"
            disabled={before === null}
            onClick={() => before !== null && setInstant(before, true)}
          />
          <Button
            icon={playing ? 'pause' : 'play'}
            className="px-2.5!"
            aria-label={playing ? 'Pause' : 'Play through the day'}
            aria-pressed={playing}
            onClick={() => setPlaying(!playing)}
          />
          <IconButton
            variant="outline"
            icon="chevronRight"
            label="To the next AOS or LOS"
            disabled={next === null}
            onClick={() => next !== null && setInstant(next, true)}
          />
          <span className="ml-1 text-caption leading-tight text-ink-muted">
            from AOS or
            <br />
            LOS to next
          </span>
        </div>
      </div>
      <PlanLoadLine mode="instant" height={100} />
    </div>
  );
}

function useEvents(): { next: number | null; before: number | null } {
  const { legs } = usePlanDesk();
  const { instantMs } = usePlanView();
  let next: number | null = null;
  let before: number | null = null;
  for (const { fromMs, toMs, direction } of legs) {
    if (direction !== 'receive') continue;
    for (const ms of [fromMs, toMs]) {
      if (ms > instantMs && (next === null || ms < next)) next = ms;
      if (ms < instantMs && (before === null || ms > before)) before = ms;
    }
  }
  return { next, before };
}

function usePlay(): [boolean, (playing: boolean) => void] {
  const { span } = usePlanDesk();
  const { instantMs, setInstant } = usePlanView();
  const [playing, setPlaying] = useState(false);
  const latest = useRef(instantMs);
  useEffect(() => {
    latest.current = instantMs;
  });
  useEffect(() => {
    if (!playing) return undefined;
    let frame = 0;
    let last = performance.now();
    const step = (now: number): void => {
      const ms = latest.current + (now - last) * SPEED;
      // A second of the day is the least step: slower frames skip, they do not lag.
      if (ms - latest.current >= 1000) {
        last = now;
        if (ms >= span.toMs) return setPlaying(false);
        setInstant(ms, false);
      }
      frame = requestAnimationFrame(step);
    };
    frame = requestAnimationFrame(step);
    return () => {
      cancelAnimationFrame(frame);
      setInstant(latest.current, true);
    };
  }, [playing, span, setInstant]);
  return [playing, setPlaying];
}
