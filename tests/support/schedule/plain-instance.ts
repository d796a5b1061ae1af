import type { BeamAssignInstance } from '../../../server/solver/beam-assign.ts';
import { pick, seededRandom } from './random.ts';

type Random = () => number;
const whole = (random: Random, from: number, to: number): number =>
  from + Math.floor(random() * (to - from + 1));

/** A tiny instance with every rule of the plain format; values and times are small so that they often coincide. */
export function tinyInstance(seed: number): BeamAssignInstance {
  const random = seededRandom(seed);
  const horizon = 60;
  const faces = Array.from({ length: whole(random, 1, 2) }, (_, index) => ({
    id: `F${index}`,
    maxTransmit: pick(random, [null, 1, 2]),
  }));
  const groups = Array.from({ length: whole(random, 1, 3) }, (_, index) => ({
    id: `G${index}`,
    face: `F${whole(random, 0, faces.length - 1)}`,
    channels: whole(random, 1, 2),
    setup: whole(random, 0, 3),
    teardown: whole(random, 0, 2),
    closed: random() < 0.3 ? shut : [],
  }));
  const passes = Array.from({ length: whole(random, 2, 6) }, (_, index) => ({
    id: `P${index}`,
    mission: `M${index % 2}`,
    los: whole(random, 10, 50),
  }));
  const windows = passes.flatMap(({ id, los }) =>
    Array.from({ length: whole(random, 1, 3) }, (_, index) => {
      const end = los - whole(random, 0, 4);
      return {
        id: `${id}w${index}`,
        pass: id,
        group: `G${whole(random, 0, groups.length - 1)}`,
        start: Math.max(0, end - whole(random, 3, 18)),
        end,
        value: whole(random, 1, 9),
        transmit: random() < 0.4,
      };
    }),
  );
  const conflicts = passes.slice(1).flatMap(({ id }, index) => {
    const start = whole(random, 0, 45);
    const other = passes[whole(random, 0, index)]?.id ?? id;
    return random() < 0.5
      ? [
          {
            face: pick(random, ['F0', 'F1']),
            a: other,
            b: id,
            start,
            end: start + whole(random, 2, 12),
          },
        ]
      : [];
  });
  return {
    format: 'beam-assign/1',
    horizon,
    faces,
    groups,
    passes,
    windows,
    conflicts,
    demands: demands(random),
    locks: [],
  };
}

const shut: [number, number][] = [[20, 26]];

function demands(random: Random): BeamAssignInstance['demands'] {
  return ['M0', 'M1']
    .filter(() => random() < 0.7)
    .map((mission) => ({
      mission,
      minContacts: whole(random, 0, 3),
      minSeconds: pick(random, [0, 0, 12]),
      maxContacts: pick(random, [null, null, 1, 2]),
      maxGap: pick(random, [null, null, 20]),
      costPerMissingContact: whole(random, 0, 12),
      costPerMissingSecond: whole(random, 0, 2),
      costPerMissedGapWindow: whole(random, 0, 7),
    }));
}

const most = (intervals: readonly (readonly [number, number])[]): number =>
  Math.max(0, ...intervals.map(([at]) => intervals.filter(([s, e]) => s <= at && at < e).length));

/** Value of a choice of windows by the text of the format; null when it breaks a rule. Written for the tests only. */
export function plainValue(instance: BeamAssignInstance, ids: readonly string[]): number | null {
  const chosen = instance.windows.filter(({ id }) => ids.includes(id));
  const group = (id: string): BeamAssignInstance['groups'][number] | undefined =>
    instance.groups.find((one) => one.id === id);
  const face = (window: { group: string }): string => group(window.group)?.face ?? '';
  if (new Set(chosen.map(({ pass }) => pass)).size < chosen.length) return null;
  if (instance.locks.some((lock) => !ids.includes(lock))) return null;
  for (const { id, channels, setup, teardown, closed } of instance.groups) {
    const busy = chosen
      .filter((window) => window.group === id)
      .map(({ start, end }) => [start - setup, end + teardown] as const);
    if (most(busy) > channels) return null;
    if (busy.some(([s, e]) => closed.some(([from, to]) => s < to && from < e))) return null;
  }
  for (const { id, maxTransmit } of instance.faces) {
    const on = chosen.filter((window) => window.transmit && face(window) === id);
    if (
      maxTransmit !== null &&
      most(on.map(({ start, end }) => [start, end] as const)) > maxTransmit
    )
      return null;
  }
  for (const clash of instance.conflicts) {
    const [a, b] = [clash.a, clash.b].map((pass) =>
      chosen.find((window) => window.pass === pass && face(window) === clash.face),
    );
    if (a && b && Math.max(a.start, b.start, clash.start) < Math.min(a.end, b.end, clash.end))
      return null;
  }
  return demandsValue(instance, chosen);
}

function demandsValue(
  instance: BeamAssignInstance,
  chosen: BeamAssignInstance['windows'],
): number | null {
  let value = chosen.reduce((sum, window) => sum + window.value, 0);
  for (const demand of instance.demands) {
    const passes = instance.passes.filter(({ mission }) => mission === demand.mission);
    const mine = chosen.filter(({ pass }) => passes.some(({ id }) => id === pass));
    const seconds = mine.reduce((sum, { start, end }) => sum + end - start, 0);
    if (demand.maxContacts !== null && mine.length > demand.maxContacts) return null;
    value -= demand.costPerMissingContact * Math.max(0, demand.minContacts - mine.length);
    value -= demand.costPerMissingSecond * Math.max(0, demand.minSeconds - seconds);
    const gap = demand.maxGap;
    if (gap === null) continue;
    for (const tau of new Set([0, ...passes.map(({ los }) => los)])) {
      if (tau + gap > instance.horizon) continue;
      const touched = mine.some(({ start, end }) => start < tau + gap && end > tau);
      if (!touched) value -= demand.costPerMissedGapWindow;
    }
  }
  return value;
}

/** The best value of all plans, by trying every one. */
export function bestByTrying(instance: BeamAssignInstance): number {
  let best = -Infinity;
  const choose = (index: number, ids: string[]): void => {
    const pass = instance.passes[index];
    if (!pass) {
      best = Math.max(best, plainValue(instance, ids) ?? -Infinity);
      return;
    }
    choose(index + 1, ids);
    for (const { id } of instance.windows.filter((window) => window.pass === pass.id))
      choose(index + 1, [...ids, id]);
  };
  choose(0, []);
  return best;
}
