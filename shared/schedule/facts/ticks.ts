import { patternEnvelopeDb } from '../../array/pattern-envelope.ts';
import { elementLossDb } from '../../array/isolation.ts';
import { SECOND_MS, type Interval } from '../../time.ts';
import { dbToPower, powerToDb } from '../../units.ts';
import type { Signal, SignalState } from './beam-signals.ts';

/** Common grid of all passes, on which pairs are screened without propagating again. */
const TICK_MS = 4 * SECOND_MS;
/** Steps in which the crossings of a suspect pair are bracketed. */
const FINE_MS = SECOND_MS;
const MOST_MS = 32 * SECOND_MS;
/** Largest step in lobes of the narrowest pattern. */
const LOBES_A_STEP = 0.3;
/** Slack of the screen for what levels do between two ticks, dB. */
const SLACK_DB = 0.5;
/** Share of the motion between two ticks that a curved path can come nearer than both its ends. */
const CURVATURE = 0.25;

/** What the screen needs of a signal at multiples of the tick: u, v, level and element loss, four numbers each. */
export interface TickSignal {
  firstTick: number;
  count: number;
  values: Float64Array;
}

export function ticksOf(signal: Signal, stateAt: (ms: number) => SignalState): TickSignal {
  const { pass, beam } = signal;
  const firstTick = Math.floor(pass.fromMs / TICK_MS);
  const count = Math.ceil(pass.toMs / TICK_MS) - firstTick + 1;
  const values = new Float64Array(4 * count);
  for (let tick = 0; tick < count; tick++) {
    const ms = Math.min(pass.toMs, Math.max(pass.fromMs, (firstTick + tick) * TICK_MS));
    const { at, levelDb } = stateAt(ms);
    values.set([at.u, at.v, levelDb, elementLossDb(beam, at)], 4 * tick);
  }
  return { firstTick, count, values };
}

/** Upper bounds of a beam's pattern along both axes. */
export interface BeamBounds {
  u: (distanceU: number) => number;
  v: (distanceU: number) => number;
  floorPower: number;
  lobeU: number;
}

export function beamBounds({ beam }: Signal): BeamBounds {
  const { u, v } = beam.pattern;
  return {
    u: patternEnvelopeDb(u),
    v: patternEnvelopeDb(v),
    floorPower: beam.floorDb === null ? 0 : dbToPower(-Math.abs(beam.floorDb)),
    lobeU: Math.min(1 / (u.weights.length * u.pitch), 1 / (v.weights.length * v.pitch)),
  };
}

const nearest = (before: number, after: number): number =>
  before * after <= 0
    ? 0
    : Math.max(
        0,
        Math.min(Math.abs(before), Math.abs(after)) - CURVATURE * Math.abs(after - before),
      );

/** Parts of a span in which the pair might disturb each other more than `allowedDb` below, joined ticks. */
export function suspectParts(
  [a, b]: readonly [TickSignal, TickSignal],
  bounds: readonly BeamBounds[],
  {
    span,
    leastNeedDb,
    discriminationDb,
  }: { span: Interval; leastNeedDb: number; discriminationDb: number },
): Interval[] {
  const parts: Interval[] = [];
  const first = Math.max(Math.floor(span.fromMs / TICK_MS), a.firstTick, b.firstTick);
  const last = Math.min(
    Math.ceil(span.toMs / TICK_MS),
    a.firstTick + a.count - 1,
    b.firstTick + b.count - 1,
  );
  const at = (one: TickSignal, tick: number, field: number): number =>
    one.values[4 * (tick - one.firstTick) + field] ?? NaN;
  const apart = (tick: number, field: number): number => at(a, tick, field) - at(b, tick, field);
  for (let tick = first; tick < last; tick++) {
    const du = nearest(apart(tick, 0), apart(tick + 1, 0));
    const dv = nearest(apart(tick, 1), apart(tick + 1, 1));
    const flux = (one: number): number => Math.abs(apart(one, 2)) + Math.abs(apart(one, 3));
    const unequalDb = Math.max(flux(tick), flux(tick + 1)) + SLACK_DB;
    const gainDb = Math.max(
      ...bounds.map((beam) => powerToDb(dbToPower(beam.u(du) + beam.v(dv)) + beam.floorPower)),
    );
    if (gainDb + unequalDb - discriminationDb < -leastNeedDb) continue;
    const part = { fromMs: tick * TICK_MS, toMs: (tick + 1) * TICK_MS };
    const open = parts.at(-1);
    if (open?.toMs === part.fromMs) open.toMs = part.toMs;
    else parts.push(part);
  }
  return parts.flatMap(({ fromMs, toMs }) => {
    const cut = { fromMs: Math.max(fromMs, span.fromMs), toMs: Math.min(toMs, span.toMs) };
    return cut.fromMs < cut.toMs ? [cut] : [];
  });
}

/**
 * Instants of a part between which the pair moves through the narrower pattern by less than a third of a lobe, so that
 * levels turn once at most between three of them: whole seconds at first, more where it is fast, fewer where it is slow.
 */
export function fineTimes(
  part: Interval,
  separationU: (ms: number) => readonly [number, number],
  lobeU: number,
): number[] {
  const times = [part.fromMs];
  let before = separationU(part.fromMs);
  let [fromMs, stepMs] = [part.fromMs, FINE_MS];
  while (fromMs < part.toMs) {
    const toMs = Math.min(part.toMs, fromMs + stepMs);
    const now = separationU(toMs);
    const lobes = Math.hypot(now[0] - before[0], now[1] - before[1]) / lobeU;
    const pieces = Math.max(1, Math.ceil(lobes / LOBES_A_STEP));
    for (let piece = 1; piece < pieces; piece++)
      times.push(fromMs + (piece * (toMs - fromMs)) / pieces);
    times.push(toMs);
    if (lobes < LOBES_A_STEP / 4) stepMs = Math.min(MOST_MS, 2 * stepMs);
    else if (lobes > LOBES_A_STEP / 2) stepMs = Math.max(FINE_MS, stepMs / 2);
    [fromMs, before] = [toMs, now];
  }
  return times;
}
