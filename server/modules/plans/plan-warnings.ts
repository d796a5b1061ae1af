import type { Plan } from '../../../shared/schemas/plan.ts';
import { DAY_MS, toIso } from '../../../shared/time.ts';
import type { DayPlan } from './plan.entity.ts';
import type { PlanView } from './plan-read.service.ts';

type Warnings = Plan['warnings'];

/** Common practice: along-track error of a low orbit reaches several km after three days. */
const OLD_ELEMENTS_MS = 3 * DAY_MS;

/** What a planner should know but nobody is refused for (DESIGN section 3). */
export const planWarnings = (view: PlanView, plan: DayPlan): Warnings => [
  ...exceeded(view),
  ...oldElements(view),
  ...vanished(view, plan),
];

const exceeded = ({ score, world }: PlanView): Warnings =>
  score.requirements
    .filter((result) => result.exceeded)
    .map((result) => ({
      code: 'more-than-wanted',
      message: `${world.day.missions.find((m) => m.id === result.missionId)?.name ?? 'A mission'} gets ${result.given}, more than the ${result.most ?? 0} it wants.`,
      contactIds: [],
      fromUtc: toIso(world.day.day.fromMs),
      toUtc: toIso(world.day.day.toMs),
    }));

const oldElements = ({ rows, world }: PlanView): Warnings =>
  rows.flatMap((row) => {
    const pass = world.context.passes.get(row.contact.pass.id);
    const source = pass && world.sources.get(pass.predictionId);
    if (!source || row.receiveFromMs - source.epochMs < OLD_ELEMENTS_MS) return [];
    const days = Math.floor((row.receiveFromMs - source.epochMs) / DAY_MS);
    return [
      {
        code: 'old-element-set',
        message: `${row.contact.satellite.name}: the element set will be ${days} days old.`,
        contactIds: [row.contact.id],
        fromUtc: toIso(row.receiveFromMs),
        toUtc: toIso(row.receiveToMs),
      },
    ];
  });

const vanished = ({ rows, world }: PlanView, plan: DayPlan): Warnings =>
  plan.state === 'superseded'
    ? []
    : rows
        .filter((row) => !world.context.passes.has(row.contact.pass.id))
        .map((row) => ({
          code: 'pass-vanished',
          message: `${row.contact.satellite.name}: by the newest elements there is no such pass.`,
          contactIds: [row.contact.id],
          fromUtc: toIso(row.receiveFromMs),
          toUtc: toIso(row.receiveToMs),
        }));
