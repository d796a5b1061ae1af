import { planContext, type PlanContext } from '../../shared/schedule/context.ts';
import type { ContactModel } from '../../shared/schedule/model.ts';
import { changesOf, fateOf } from './changes.ts';
import { compileDay, type CompiledDay, type CompileQuestion } from './compile/compile-day.ts';
import { passesForRepair, sortOutBroken, withRepairGoals } from './compile/repair.ts';
import { vetLocks, type SetAside } from './compile/standing.ts';
import { contactWorth } from './compile/worth.ts';
import type { RunControl } from './control.ts';
import { decodePlan } from './decode.ts';
import { solveLexicographic, valueOf, type LexicographicResult } from './lexicographic.ts';
import { polish } from './polish.ts';
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
        const minutes = value / 60 + standingMinutes(task);
        control.onPlan([...standing(task.stand), ...contacts], minutes);
      },
    });
    const contacts = decodePlan(task.context, compiled, solved.columns, before);
    if (Array.isArray(contacts))
      return resultOf(task, compiled, solved, polished(task, contacts), control.now() - began);
    // Only channels with something fixed on them can be the trouble.
    const named = contacts.channels.filter(({ id }) => compiled.fixed.heldOn(id).length > 0);
    if (named.every(({ id }) => apart.has(id))) throw new Error('The channels cannot be numbered.');
    apart = new Set([...apart, ...named.map(({ id }) => id)]);
  }
}

/** The contacts that stand and the chosen ones, stretched to the second; a repair changes nothing that it need not. */
function polished(task: Task, chosen: SolvedContact[]): SolvedContact[] {
  const { context, input, stand } = task;
  const stood = standing(stand);
  const untouched = new Set([...stood, ...chosen.filter((one) => isUnchanged(input.current, one))]);
  const all = [...stood, ...chosen];
  const served = new Set([...all, ...context.day.neighbours].map(({ passId }) => passId));
  const open = input.mode === 'new' ? context.day.passes.filter(({ id }) => !served.has(id)) : [];
  return polish(context, all, untouched, open);
}

const isUnchanged = (current: readonly ContactModel[], contact: SolvedContact): boolean => {
  const before = current.find(({ id }) => id === contact.id);
  return before !== undefined && fateOf(before, contact) !== 'changed';
};

/** Weighted minutes that the solver counted for what stands beside its choice. */
const standingMinutes = ({ context, stand }: Task): number =>
  stand.reduce((sum, contact) => sum + contactWorth(context, contact, true), 0) / 60;

function objectiveOf({ context, input }: Task, contacts: readonly SolvedContact[]): number {
  const worth = contacts.map((one) => contactWorth(context, one, isUnchanged(input.current, one)));
  return worth.reduce((sum, one) => sum + one, 0) / 60;
}

function resultOf(
  task: Task,
  compiled: CompiledDay,
  solved: LexicographicResult,
  contacts: SolvedContact[],
  tookMs: number,
): SolveResult {
  const { context, input, setAside } = task;
  const objective = objectiveOf(task, contacts);
  const onGrid = solved.valueBound === null ? null : solved.valueBound / 60 + standingMinutes(task);
  const bound = onGrid === null ? null : Math.max(objective, onGrid);
  const gap = bound === null ? null : (bound - objective) / Math.max(1, Math.abs(objective));
  const provenance = provenanceOf(solved, gap);
  const locksSetAside = setAside.map((one) => lockWords(context, one));
  const gridSeconds = compiled.gridMs && compiled.gridMs / 1000;
  const { timeLimitSeconds: limitSeconds } = input;
  const { wholeOnly } = compiled;
  const { levels } = solved;
  const proof = { provenance, gap, levels, limitSeconds, gridSeconds, wholeOnly };
  return {
    contacts,
    objective,
    bound,
    gap,
    provenance,
    seconds: tookMs / 1000,
    columns: compiled.options.length,
    gridSeconds,
    words: proofWords(context, contacts, proof, locksSetAside),
    changes: changesOf(context, input.current, contacts),
    locksSetAside,
  };
}
