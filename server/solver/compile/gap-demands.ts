import type { PlanContext } from '../../../shared/schedule/context.ts';
import type { ContactModel, RequirementModel } from '../../../shared/schedule/model.ts';
import type { makeQualifier } from '../../../shared/schedule/score/qualifying.ts';
import { MINUTE_MS, SECOND_MS, type Interval } from '../../../shared/time.ts';
import type { Demand } from '../model/assignment.ts';
import { legsOf } from './option-legs.ts';
import type { Option } from './options.ts';

/** Price of one stretch of the largest gap's length without a contact. */
const MISSED_STRETCH = 0.25;

interface GapSetting {
  context: PlanContext;
  options: readonly Option[];
  fixed: readonly ContactModel[];
  qualify: ReturnType<typeof makeQualifier>;
}

/** A contact that could cover: `column` null stands for one that is fixed. */
interface Cover extends Interval {
  column: number | null;
}

/**
 * The largest gap as covering stretches: whatever instant tau one takes, some contact is on or begins within the gap
 * after it. Only stretches with the fewest possible covers are kept; every other one follows from them.
 */
export function coveringStretches(
  covers: readonly Cover[],
  gapMs: number,
  fromMs: number,
  untilMs: number,
): number[][] {
  // At tau a cover counts that ends after tau and begins no later than tau + gap: it enters, then it leaves.
  const edges = covers
    .flatMap((cover) => [
      { at: Math.max(fromMs, cover.fromMs - gapMs), enters: true, cover },
      { at: Math.max(fromMs, cover.toMs), enters: false, cover },
    ])
    .sort((a, b) => a.at - b.at || Number(b.enters) - Number(a.enters));
  const active = new Set<Cover>();
  const stretches: number[][] = [];
  let [shrunk, tau, next] = [true, fromMs, 0];
  while (tau + gapMs < untilMs) {
    for (let edge = edges[next]; edge && edge.at <= tau; edge = edges[++next]) {
      if (edge.enters) active.add(edge.cover);
      else shrunk = active.delete(edge.cover) || shrunk;
    }
    const nextAt = edges[next]?.at ?? Infinity;
    const grows = nextAt + gapMs >= untilMs || entersAt(edges, next);
    if (shrunk && grows) {
      shrunk = false;
      const members = [...active];
      if (members.every(({ column }) => column !== null))
        stretches.push(members.flatMap(({ column }) => column ?? []));
    }
    tau = nextAt;
  }
  return stretches;
}

function entersAt(edges: readonly { at: number; enters: boolean }[], first: number): boolean {
  const at = edges[first]?.at;
  for (let index = first; edges[index]?.at === at && index < edges.length; index++)
    if (edges[index]?.enters) return true;
  return false;
}

export function gapDemands(
  { context, options, fixed, qualify }: GapSetting,
  line: RequirementModel,
  satelliteId: string | null,
): Demand[] {
  const { day } = context.day;
  const concerns = (one: { missionId: string; satelliteId: string }): boolean =>
    one.missionId === line.missionId && (satelliteId === null || one.satelliteId === satelliteId);
  const planned: Cover[] = options.flatMap((option, column) => {
    const legs = legsOf(option);
    if (!concerns(option.pass) || !qualify(line, legs).counts) return [];
    return [{ column, fromMs: legs.receive.fromMs, toMs: legs.receive.toMs }];
  });
  const standing: Cover[] = fixed
    .filter((contact) => concerns(contact) && qualify(line, contact).counts)
    .map(({ receive }) => ({ column: null, fromMs: receive.fromMs, toMs: receive.toMs }));
  const before = standing.filter(({ toMs }) => toMs <= day.fromMs).map(({ toMs }) => toMs);
  const after = standing.filter(({ fromMs }) => fromMs >= day.toMs).map(({ fromMs }) => fromMs);
  const fromMs = before.length > 0 ? Math.max(...before) : day.fromMs;
  const untilMs = after.length > 0 ? Math.min(...after) : day.toMs;
  const gapMs = Math.max(SECOND_MS, (line.most ?? 0) * MINUTE_MS);
  const level = context.missions.get(line.missionId)?.priority ?? 5;
  return coveringStretches([...planned, ...standing], gapMs, fromMs, untilMs).map(
    (members, index) => ({
      name: `${line.id}|${satelliteId ?? ''}|${index}`,
      level,
      members,
      amounts: members.map(() => 1),
      least: 1,
      pieces: [{ size: 1, cost: MISSED_STRETCH }],
    }),
  );
}
