import { satelliteName, type PlanContext } from '../../shared/schedule/context.ts';
import { judgeRequests } from '../../shared/schedule/score/requests.ts';
import { judgeRequirements } from '../../shared/schedule/score/requirements.ts';
import { clock } from '../../shared/schedule/words.ts';
import type { SetAside } from './compile/standing.ts';
import { named } from './changes.ts';
import type { LevelResult } from './lexicographic.ts';
import type { LockSetAside, Provenance, SolvedContact } from './planned.ts';

/** What a run ends with, as far as words need it. */
export interface Proof {
  provenance: Provenance;
  gap: number | null;
  levels: readonly LevelResult[];
  limitSeconds: number;
  gridSeconds: number | null;
  /** Something contends, but windows were used whole: plans with trimmed ones were not compared. */
  wholeOnly: boolean;
}

/** Among which plans the best was proven. */
const basis = ({ gridSeconds, wholeOnly }: Proof): string => {
  if (gridSeconds !== null) return ` on a ${gridSeconds} s grid`;
  return wholeOnly ? ' with windows used whole' : '';
};

function quality(proof: Proof): string {
  const { provenance, gap, wholeOnly } = proof;
  const grid = `${basis(proof)}${wholeOnly ? ', then fitted to the second' : ''}`;
  const far = gap === null ? 'how far from the best is not known' : `${gapWords(gap)}${grid}`;
  if (provenance === 'proven')
    return gap !== null && gap > 1e-6 ? `Proven: ${far}.` : `Proven best${grid}.`;
  if (provenance === 'heuristic') return `Found by search, not by the solver; ${far}.`;
  if (provenance === 'cancelled') return `Cancelled: the best plan found so far; ${far}.`;
  return `${far.charAt(0).toUpperCase()}${far.slice(1)}.`;
}

function gapWords(gap: number): string {
  const percent = gap * 100;
  if (percent < 0.01) return 'at most 0.01 % from the best';
  return `at most ${percent < 1 ? percent.toFixed(2) : percent.toFixed(1)} % from the best`;
}

function minimums(context: PlanContext, contacts: readonly SolvedContact[], proof: Proof): string {
  const all = named(contacts);
  const unmet =
    judgeRequirements(context.day, all).filter(({ met }) => !met).length +
    judgeRequests(context.day, all).filter(({ met }) => !met).length;
  if (unmet === 0) return 'Everything asked for is met.';
  const count =
    unmet === 1 ? '1 thing asked for is not met' : `${unmet} things asked for are not met`;
  const proven = proof.levels.every((level) => level.proven);
  return proven
    ? `${count}; no plan${basis(proof)} does better (proven).`
    : `${count}; a plan that does better is not ruled out.`;
}

/** Sentences a scheduler understands: how good, what is missing, which locks gave way, what limited the run. */
export function proofWords(
  context: PlanContext,
  contacts: readonly SolvedContact[],
  proof: Proof,
  locks: readonly LockSetAside[],
): string {
  const limited = proof.provenance === 'time-limit' || proof.provenance === 'heuristic';
  return [
    quality(proof),
    minimums(context, contacts, proof),
    ...locks.map(({ words }) => words),
    ...(limited ? [`Stopped at the limit of ${proof.limitSeconds} s.`] : []),
  ].join(' ');
}

/** Why a lock was set aside, naming the smallest set it clashes with. */
export function lockWords(context: PlanContext, { contact, against }: SetAside): LockSetAside {
  const name = `${satelliteName(context, contact.satelliteId)} at ${clock(contact.receive.fromMs)}`;
  const others = against.map(
    (other) => `${satelliteName(context, other.satelliteId)} at ${clock(other.receive.fromMs)}`,
  );
  const why =
    others.length > 0
      ? `it cannot stand beside ${others.join(' and ')}`
      : 'it breaks a rule by itself';
  return { contactId: contact.id, words: `The lock of ${name} was set aside: ${why}.` };
}
