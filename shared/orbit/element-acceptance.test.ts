import { describe, expect, it } from 'vitest';
import { twoLines, type InventedOrbit } from '../../tests/support/orbit/two-lines.ts';
import { DAY_MS } from '../time.ts';
import { judgeTrialPropagation } from './element-acceptance.ts';
import { readElementSets, type ReadElementSet } from './element-reader.ts';

const EPOCH_MS = Date.UTC(2026, 11, 1);

const setOf = (orbit: Partial<InventedOrbit> = {}): ReadElementSet => {
  const { line1, line2 } = twoLines(orbit);
  const reading = readElementSets(new TextEncoder().encode(`${line1}\n${line2}`), 'x.tle');
  const [set] = reading.accepted;
  if (!set) throw new Error(reading.refused[0]?.reason ?? 'nothing was read');
  return set;
};

describe('accepting element sets', () => {
  it('accepts a fresh set, and one from some days ahead', () => {
    expect(judgeTrialPropagation(setOf(), EPOCH_MS + 2 * DAY_MS)).toBeNull();
    expect(judgeTrialPropagation(setOf(), EPOCH_MS - 10 * DAY_MS)).toBeNull();
  });

  it('refuses an old set with its age and the limit', () => {
    const fault = judgeTrialPropagation(setOf(), EPOCH_MS + 61 * DAY_MS);
    expect(fault?.code).toBe('EPOCH_TOO_OLD');
    expect(fault?.reason).toBe(
      'The epoch is 61.0 days old; at most 60 days are accepted. Load a newer set.',
    );
    expect(judgeTrialPropagation(setOf(), EPOCH_MS + 61 * DAY_MS, { oldestDays: 90 })).toBeNull();
  });

  it('refuses an epoch far ahead: its date is wrong', () => {
    expect(judgeTrialPropagation(setOf(), EPOCH_MS - 16 * DAY_MS)?.code).toBe(
      'EPOCH_TOO_FAR_AHEAD',
    );
  });

  it('refuses an orbit that decays before the end of its window', () => {
    const sinking = setOf({ meanMotionRevPerDay: 16.4, bstar: ' 50000-3' });
    const fault = judgeTrialPropagation(sinking, EPOCH_MS);
    expect(fault?.code).toBe('PROPAGATION_FAILED');
    expect(fault?.reason).toMatch(/no position \d+\.\d days after the epoch \(code \d\)/);
  });
});
