import { describe, expect, it } from 'vitest';
import type { PlanSummary } from '../../../shared/schemas/plan.ts';
import { planOfRecord } from './plan-of-record.ts';

const plan = (id: string, day: string, state: PlanSummary['state'], revision = 1): PlanSummary =>
  // Only what the choice looks at.
  ({ id, day, state, revision }) as unknown as PlanSummary;

describe('the plan a day goes by', () => {
  it('is the released one, even while a newer revision is a draft', () => {
    const plans = [plan('new', 'd', 'draft', 3), plan('run', 'd', 'released', 2)];
    expect(planOfRecord(plans, 'd')?.id).toBe('run');
  });

  it('is never a superseded one, nor one of another day', () => {
    const plans = [plan('old', 'd', 'superseded', 1), plan('other', 'e', 'released')];
    expect(planOfRecord(plans, 'd')).toBeNull();
  });
});
