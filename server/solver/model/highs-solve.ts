import loadHighs, { type Highs, type Model } from 'highs';
import type { Program } from './program.ts';

export interface ProgramRun {
  program: Program;
  /** To be maximised; one a variable. */
  objective: Float64Array;
  start: Float64Array | null;
  timeLimitSeconds: number;
  relativeGap: number;
  /** Asked at the solver's own checkpoints; true ends the run with the best plan so far. */
  shouldStop: () => boolean;
  onIncumbent: (values: Float64Array) => void;
}

export interface ProgramAnswer {
  status: 'optimal' | 'time-limit' | 'interrupted';
  values: Float64Array | null;
  objective: number | null;
  /** Proven: no plan is worth more. */
  bound: number | null;
}

let runtime: Promise<Highs> | null = null;
const quiet = (): void => undefined;
const loaded = (): Promise<Highs> => (runtime ??= loadHighs({ print: quiet, printErr: quiet }));

/** Model status codes of the solver that are answers; every other one is a refusal and thrown. */
const ANSWERS: Readonly<Record<number, ProgramAnswer['status']>> = {
  7: 'optimal',
  13: 'time-limit',
  17: 'interrupted',
};
const FEASIBLE = 2;

function create(highs: Highs, { program, objective }: ProgramRun): Model {
  const { variables, integrality } = program;
  return highs.createModel({
    numCols: variables,
    numRows: program.rowLower.length,
    sense: highs.constants.objectiveSense.maximize,
    colCost: objective,
    colLower: new Float64Array(variables),
    colUpper: program.upper,
    rowLower: program.rowLower,
    rowUpper: program.rowUpper,
    matrix: {
      format: 'csr',
      numRows: program.rowLower.length,
      numCols: variables,
      starts: program.starts,
      indices: program.indices,
      values: program.values,
    },
    integrality,
  });
}

function runModel(highs: Highs, model: Model, run: ProgramRun): ProgramAnswer {
  model.options.set({
    output_flag: false,
    time_limit: run.timeLimitSeconds,
    mip_rel_gap: run.relativeGap,
    mip_abs_gap: 1e-6,
  });
  if (run.start) model.setSolution({ colValue: run.start });
  const { mipImprovingSolution, mipInterrupt } = highs.constants.callbackType;
  const { modelStatus } = model.run({
    [mipImprovingSolution](event) {
      if (event.data.mip_solution) run.onIncumbent(event.data.mip_solution);
    },
    [mipInterrupt](event) {
      if (run.shouldStop()) event.interrupt();
    },
  });
  const status = ANSWERS[modelStatus];
  if (!status) throw new Error(`The solver refused the model (status ${modelStatus}).`);
  const hasPlan = model.info.get('primal_solution_status') === FEASIBLE;
  const bound = Number(model.info.get('mip_dual_bound'));
  return {
    status,
    values: hasPlan ? model.getSolution().colValue : null,
    objective: hasPlan ? model.getObjectiveValue() : null,
    bound: Number.isFinite(bound) ? bound : null,
  };
}

/**
 * One run of the mixed-integer solver. Blocks its thread until it ends; belongs into a worker. Throws when the solver
 * answers with anything but a plan, a time limit or an interruption (a malformed model answers "empty" without a word).
 */
export async function solveProgram(run: ProgramRun): Promise<ProgramAnswer> {
  const highs = await loaded();
  const model = create(highs, run);
  try {
    return runModel(highs, model, run);
  } finally {
    model.dispose();
  }
}
