import { useCallback, useMemo, useState } from 'react';
import { z } from 'zod';
import { HOUR_MS, MINUTE_MS, type Interval } from '../../../../shared/time.ts';
import { fitBrush } from '../../../charts/load-brush.tsx';
import { useUrlState } from '../../../hooks/use-url-state.ts';
import { clockMinutes, clockSeconds, readClock } from '../../../lib/format-time.ts';
import { serverNow } from '../../../lib/server-clock.ts';
import type { PlanLeg } from '../model/plan-legs.ts';
import type { PlanView } from './plan-view.ts';

const SHAPE = {
  view: z.enum(['calendar', 'sky', 'map', 'table']).default('calendar'),
  from: z.string().optional(),
  to: z.string().optional(),
  at: z.string().optional(),
  contact: z.uuid().optional(),
  pass: z.uuid().optional(),
};

/** Where the plan opens: around the contact of the link, around now on its own day, else around its busiest hour and a half. */
function firstStretch(
  span: Interval,
  legs: readonly PlanLeg[],
  contactId: string | undefined,
): Interval {
  const named = legs.find((leg) => leg.contactId === contactId);
  if (named)
    return fitBrush(
      {
        fromMs: floorTo(named.fromMs - 40 * MINUTE_MS),
        toMs: floorTo(named.fromMs + 50 * MINUTE_MS),
      },
      span,
    );
  const now = serverNow();
  if (now >= span.fromMs && now < span.toMs)
    return fitBrush(
      { fromMs: floorTo(now - 20 * MINUTE_MS), toMs: floorTo(now + 70 * MINUTE_MS) },
      span,
    );
  let [best, most] = [span.fromMs + 8 * HOUR_MS, 0];
  for (let ms = span.fromMs; ms + 90 * MINUTE_MS <= span.toMs; ms += 10 * MINUTE_MS) {
    const count = legs.filter((leg) => leg.fromMs >= ms && leg.toMs <= ms + 90 * MINUTE_MS).length;
    if (count > most) [best, most] = [ms, count];
  }
  return fitBrush({ fromMs: best, toMs: best + 90 * MINUTE_MS }, span);
}
const floorTo = (ms: number): number => Math.floor(ms / (5 * MINUTE_MS)) * 5 * MINUTE_MS;

const clockOf = (ms: number, span: Interval): string =>
  ms >= span.toMs ? '24:00' : clockMinutes(ms);

export function useViewState(span: Interval, legs: readonly PlanLeg[]): PlanView {
  const [url, setUrl] = useUrlState(SHAPE);
  // While a hand moves the brush or the sky plays, the URL rests.
  const [moving, setMoving] = useState<{ stretch?: Interval; instantMs?: number }>({});
  const [opened] = useState(() => firstStretch(span, legs, url.contact));

  const stretch = useMemo(() => {
    if (moving.stretch) return moving.stretch;
    const from = url.from ? readClock(url.from, span.fromMs) : null;
    const to = url.to ? readClock(url.to, span.fromMs) : null;
    return from !== null && to !== null && from < to
      ? fitBrush({ fromMs: from, toMs: to }, span)
      : opened;
  }, [moving.stretch, url.from, url.to, span, opened]);
  const at = url.at ? readClock(url.at, span.fromMs) : null;
  const instantMs = moving.instantMs ?? at ?? middleOf(stretch, legs);

  const setStretch = useCallback(
    (next: Interval, done: boolean) => {
      if (!done) return setMoving((before) => ({ ...before, stretch: next }));
      setMoving((before) => ({ ...before, stretch: undefined }));
      setUrl({ from: clockOf(next.fromMs, span), to: clockOf(next.toMs, span) });
    },
    [setUrl, span],
  );
  const setInstant = useCallback(
    (ms: number, done: boolean) => {
      const whole = Math.round(ms / 1000) * 1000;
      if (!done) return setMoving((before) => ({ ...before, instantMs: whole }));
      setMoving((before) => ({ ...before, instantMs: undefined }));
      setUrl({ at: clockSeconds(Math.min(whole, span.toMs - 1000)) });
    },
    [setUrl, span],
  );
  const around = useCallback(
    (interval: Interval) => {
      if (interval.fromMs >= stretch.fromMs && interval.toMs <= stretch.toMs) return {};
      const half = (stretch.toMs - stretch.fromMs) / 2;
      const middle = floorTo((interval.fromMs + interval.toMs) / 2);
      const next = fitBrush({ fromMs: middle - half, toMs: middle + half }, span);
      return { from: clockOf(next.fromMs, span), to: clockOf(next.toMs, span) };
    },
    [stretch, span],
  );
  return useMemo(
    () => ({
      view: url.view,
      setView: (view) => setUrl({ view: view === 'calendar' ? null : view }, { push: true }),
      stretch,
      setStretch,
      instantMs,
      setInstant,
      contactId: url.contact ?? null,
      passId: url.contact ? null : (url.pass ?? null),
      selectContact: (contact) => setUrl({ contact, pass: null }),
      selectPass: (pass) => setUrl({ pass, contact: null }),
      showContact: (contact, interval) => setUrl({ contact, pass: null, ...around(interval) }),
      showPass: (pass, interval) => setUrl({ pass, contact: null, ...around(interval) }),
    }),
    [url, setUrl, stretch, setStretch, instantMs, setInstant, around],
  );
}

/** The instant of the sky until one is chosen: where most beams of the stretch are up. */
function middleOf(stretch: Interval, legs: readonly PlanLeg[]): number {
  let [best, most] = [floorTo((stretch.fromMs + stretch.toMs) / 2), 0];
  for (let ms = stretch.fromMs; ms < stretch.toMs; ms += 20_000) {
    const count = legs.filter((leg) => leg.fromMs <= ms && ms < leg.toMs).length;
    if (count > most) [best, most] = [ms, count];
  }
  return best;
}
