import type { PlanSummary } from '../../../shared/schemas/plan.ts';

const RANK: Record<PlanSummary['state'], number> = {
  released: 0,
  approved: 1,
  'in-review': 2,
  draft: 3,
  superseded: 4,
};

/** The plan a day goes by: released, else approved, in review, draft. */
export const planOfRecord = (plans: readonly PlanSummary[], day: string): PlanSummary | null =>
  plans
    .filter((plan) => plan.day === day && plan.state !== 'superseded')
    .sort((a, b) => RANK[a.state] - RANK[b.state] || b.revision - a.revision)[0] ?? null;
