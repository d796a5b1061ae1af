import type { RunControl } from './control.ts';
import type { Assignment, Column, Demand } from './model/assignment.ts';
import { solveWeighted } from './weighted.ts';

/** One day of one station, reduced to what the assignment needs: the plain exchange format `beam-assign/1`. */
export interface BeamAssignInstance {
  format: 'beam-assign/1';
  horizon: number;
  faces: { id: string; maxTransmit: number | null }[];
  groups: {
    id: string;
    face: string;
    channels: number;
    setup: number;
    teardown: number;
    closed: [number, number][];
  }[];
  passes: { id: string; mission: string; los: number }[];
  windows: {
    id: string;
    pass: string;
    group: string;
    start: number;
    end: number;
    value: number;
    transmit: boolean;
  }[];
  conflicts: { face: string; a: string; b: string; start: number; end: number }[];
  demands: {
    mission: string;
    minContacts: number;
    minSeconds: number;
    maxContacts: number | null;
    maxGap: number | null;
    costPerMissingContact: number;
    costPerMissingSecond: number;
    costPerMissedGapWindow: number;
  }[];
  locks: string[];
}

const indexOf = (items: readonly { id: string }[]): ReadonlyMap<string, number> =>
  new Map(items.map(({ id }, index) => [id, index]));

function columnsOf(instance: BeamAssignInstance): Column[] {
  const [faces, groups, passes] = [
    indexOf(instance.faces),
    indexOf(instance.groups),
    indexOf(instance.passes),
  ];
  return instance.windows.map((window) => {
    const groupIndex = groups.get(window.group) ?? -1;
    const group = instance.groups[groupIndex];
    if (!group) throw new Error(`Window ${window.id} names the unknown group ${window.group}.`);
    const face = faces.get(group.face) ?? -1;
    const { start: from, end: to } = window;
    const held = { resource: groupIndex, from: from - group.setup, to: to + group.teardown };
    const transmit = { resource: instance.groups.length + face, from, to };
    return {
      family: passes.get(window.pass) ?? -1,
      uses: window.transmit ? [held, transmit] : [held],
      beams: [{ beam: face, from, to }],
      value: window.value,
    };
  });
}

function demandsOf(instance: BeamAssignInstance): Demand[] {
  const missionOf = new Map(instance.passes.map(({ id, mission }) => [id, mission]));
  return instance.demands.flatMap((demand) => {
    const members = [...instance.windows.keys()].filter(
      (index) => missionOf.get(instance.windows[index]?.pass ?? '') === demand.mission,
    );
    const make = (
      name: string,
      picked: number[],
      amountOf: (column: number) => number,
      least: number,
      cost: number,
    ): Demand[] =>
      least > 0 && cost > 0
        ? [
            {
              name: `${demand.mission} ${name}`,
              level: 1,
              members: picked,
              amounts: picked.map(amountOf),
              least,
              pieces: [{ size: least, cost }],
            },
          ]
        : [];
    const seconds = (column: number): number => {
      const window = instance.windows[column];
      return window ? window.end - window.start : 0;
    };
    return [
      ...make('contacts', members, () => 1, demand.minContacts, demand.costPerMissingContact),
      ...make('seconds', members, seconds, demand.minSeconds, demand.costPerMissingSecond),
      ...gapStarts(instance, demand).flatMap((tau) => {
        const touching = members.filter((index) => {
          const window = instance.windows[index];
          return window && window.start < tau + (demand.maxGap ?? 0) && window.end > tau;
        });
        return make(`gap after ${tau}`, touching, () => 1, 1, demand.costPerMissedGapWindow);
      }),
    ];
  });
}

function gapStarts(
  { passes, horizon }: BeamAssignInstance,
  { mission, maxGap }: BeamAssignInstance['demands'][number],
): number[] {
  if (maxGap === null) return [];
  const ends = passes.filter((pass) => pass.mission === mission).map(({ los }) => los);
  return [...new Set([0, ...ends])].filter((tau) => tau + maxGap <= horizon);
}

/** Locked windows are forced by leaving every other window of their pass out and asking for them at any price. */
function lockDemands(instance: BeamAssignInstance): Demand[] {
  const worth = instance.windows.reduce((sum, { value }) => sum + Math.abs(value), 1);
  const costs = instance.demands.reduce(
    (sum, one) =>
      sum +
      one.minContacts * one.costPerMissingContact +
      one.minSeconds * one.costPerMissingSecond +
      (instance.passes.length + 1) * one.costPerMissedGapWindow,
    0,
  );
  return instance.locks.map((id) => ({
    name: `lock ${id}`,
    level: 0,
    members: [...instance.windows.keys()].filter((index) => instance.windows[index]?.id === id),
    amounts: [1],
    least: 1,
    pieces: [{ size: 1, cost: 2 * (worth + costs) }],
  }));
}

export function assignmentOf(instance: BeamAssignInstance): Assignment {
  const [faces, passes] = [indexOf(instance.faces), indexOf(instance.passes)];
  const missionOf = new Map(instance.passes.map(({ id, mission }) => [id, mission]));
  return {
    resources: [
      ...instance.groups.map((group) => ({
        name: group.id,
        capacity: group.channels,
        cuts: group.closed.map(([from, to]) => ({ from, to, amount: group.channels })),
      })),
      ...instance.faces.map(({ id, maxTransmit }) => ({
        name: `transmit ${id}`,
        capacity: maxTransmit ?? instance.windows.length,
        cuts: [],
      })),
    ],
    families: instance.passes.map(() => ({ limit: 1 })),
    columns: columnsOf(instance),
    conflicts: instance.conflicts.map(({ face, a, b, start, end }) => ({
      beam: faces.get(face) ?? -1,
      a: passes.get(a) ?? -1,
      b: passes.get(b) ?? -1,
      from: start,
      to: end,
    })),
    demands: [...lockDemands(instance), ...demandsOf(instance)],
    maximums: instance.demands.flatMap(({ mission, maxContacts }) => {
      if (maxContacts === null) return [];
      const members = [...instance.windows.keys()].filter(
        (index) => missionOf.get(instance.windows[index]?.pass ?? '') === mission,
      );
      return [{ name: mission, members, amounts: members.map(() => 1), most: maxContacts }];
    }),
  };
}

/** Solves a plain instance. Throws when a lock cannot be held: such an instance has no plan. */
export async function solveBeamAssign(
  instance: BeamAssignInstance,
  limitSeconds: number,
  control: RunControl,
): Promise<{ objective: number; bound: number | null; gap: number | null; windows: string[] }> {
  const result = await solveWeighted(assignmentOf(instance), limitSeconds, control);
  const windows = result.columns.flatMap((column) => instance.windows[column]?.id ?? []);
  const missing = instance.locks.find((lock) => !windows.includes(lock));
  if (missing !== undefined) throw new Error(`The locked window ${missing} cannot be held.`);
  const { objective, bound } = result;
  const gap =
    bound === null ? null : Math.max(0, bound - objective) / Math.max(1, Math.abs(objective));
  return { objective, bound, gap, windows };
}
