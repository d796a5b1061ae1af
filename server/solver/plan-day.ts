import { planContext, type PlanContext } from '../../shared/schedule/context.ts';
import type { ContactModel } from '../../shared/schedule/model.ts';
import { changesOf } from './changes.ts';
import { compileDay, type CompiledDay, type CompileQuestion } from './compile/compile-day.ts';
import { passesForRepair, sortOutBroken, withRepairGoals } from './compile/repair.ts';
import { vetLocks, type SetAside } from './compile/standing.ts';
import { contactWorth } from './compile/worth.ts';
import type { RunControl } from './control.ts';
import { decodePlan } from './decode.ts';
import { solveLexicographic, valueOf, type LexicographicResult } from './lexicographic.ts';
import { lockWords, proofWords } from './proof-words.ts';
import type { Provenance, SolvedContact, SolveInput, SolveResult } from './planned.ts';

export interface PlanControl extends Omit<RunControl, 'onIncumbent'> {
  onProgress: (fraction: number, step: string) => void;
  /** A valid plan, the best so far, and its objective. */
  onPlan: (contacts: SolvedContact[], objective: number) => void;
}

interface Task {
  context: PlanContext;
  input: SolveInput;
  /** Contacts of this day that stand: locks that hold and, in a repair, what is not broken. */
  stand: ContactModel[];
  /** Contacts that may change. */
  free: ContactModel[];
  broken: ContactModel[];
  setAside: SetAside[];
}

/** Sorts the current contacts: what stands, what may change, which locks cannot hold. */
function taskOf(input: SolveInput): Task {
  const context = planContext(input.day, input.facts);
  const { held, setAside } = vetLocks(
    context,
    input.current.filter(({ locked }) => locked),
  );
  const freed = setAside.map(({ contact }) => ({ ...contact, locked: false }));
  const open = [...input.current.filter(({ locked }) => !locked), ...freed];
  if (input.mode === 'new')
    return { context, input, stand: held, free: open, broken: [], setAside };
  const { whole, broken } = sortOutBroken(context, held, open);
  return { context, input, stand: [...held, ...whole], free: broken, broken, setAside };
}

/** Step of the trimmed variants in a repair, where only a few passes are open. */
const REPAIR_GRID_MS = 20_000;

function compileTask(
  { context, input, stand, free, broken }: Task,
  apart: ReadonlySet<string>,
): CompiledDay {
  const repair = input.mode === 'repair';
  const question: CompileQuestion = {
    context,
    fixed: [...input.day.neighbours, ...stand],
    current: free,
    passes: repair ? passesForRepair(context, broken) : null,
    gridMs: repair ? REPAIR_GRID_MS : null,
    apart,
  };
  const compiled = compileDay(question);
  return repair ? withRepairGoals(compiled, broken) : compiled;
}

const provenanceOf = (solved: LexicographicResult, gap: number | null): Provenance => {
  if (solved.status === 'interrupted') return 'cancelled';
  const levels = solved.levels.every(({ proven }) => proven);
  if (levels && solved.status === 'optimal' && gap !== null) return 'proven';
  return solved.bySolver ? 'time-limit' : 'heuristic';
};

const standing = (stand: readonly ContactModel[]): SolvedContact[] =>
  stand.map((one) => ({ ...one }));

/**
 * One run: sorts the current plan, compiles what is open, solves by levels, numbers the channels. Where fixed contacts
 * on named channels leave a counted plan no valid numbering, those channels are counted one by one and it is solved again.
 */
export async function planDay(input: SolveInput, control: PlanControl): Promise<SolveResult> {
  const began = control.now();
  control.onProgress(0.02, 'Reading the plan');
  const task = taskOf(input);
  const before = { current: task.free, previous: [...input.current, ...(input.previous ?? [])] };
  let apart: ReadonlySet<string> = new Set();
  for (;;) {
    control.onProgress(0.06, 'Building the model');
    const compiled = compileTask(task, apart);
    const limit = Math.max(0.2, input.timeLimitSeconds - (control.now() - began) / 1000);
    const solved = await solveLexicographic(compiled.assignment, compiled.kept, limit, {
      ...control,
      onStep: control.onProgress,
      onIncumbent: (columns) => {
        const contacts = decodePlan(task.context, compiled, columns, before);
        if (!Array.isArray(contacts)) return;
        const value = valueOf(compiled.assignment, columns);
        control.onPlan([...standing(task.stand), ...contacts], objectiveOf(task, value));
      },
    });
    const contacts = decodePlan(task.context, compiled, solved.columns, before);
    if (Array.isArray(contacts))
      return resultOf(task, [...standing(task.stand), ...contacts], solved, {
        seconds: (control.now() - began) / 1000,
        columns: compiled.options.length,
      });
    // Only channels with something fixed on them can be the trouble.
    const named = contacts.channels.filter(({ id }) => compiled.fixed.heldOn(id).length > 0);
    if (named.every(({ id }) => apart.has(id))) throw new Error('The channels cannot be numbered.');
    apart = new Set([...apart, ...named.map(({ id }) => id)]);
  }
}

/** Weighted minutes of a plan: what the solver chose and what stands. */
function objectiveOf({ context, stand }: Task, value: number): number {
  const standingWorth = stand.reduce((sum, contact) => sum + contactWorth(context, contact), 0);
  return (value + standingWorth) / 60;
}

function resultOf(
  task: Task,
  contacts: SolvedContact[],
  solved: LexicographicResult,
  figures: { seconds: number; columns: number },
): SolveResult {
  const { context, input, setAside } = task;
  const objective = objectiveOf(task, solved.value);
  const bound =
    solved.valueBound === null ? null : Math.max(objective, objectiveOf(task, solved.valueBound));
  const gap = bound === null ? null : (bound - objective) / Math.max(1, Math.abs(objective));
  const provenance = provenanceOf(solved, gap);
  const locksSetAside = setAside.map((one) => lockWords(context, one));
  const proof = { provenance, gap, levels: solved.levels, limitSeconds: input.timeLimitSeconds };
  return {
    contacts,
    objective,
    bound,
    gap,
    provenance,
    ...figures,
    words: proofWords(context, contacts, proof, locksSetAside),
    changes: changesOf(context, input.current, contacts),
    locksSetAside,
  };
}
