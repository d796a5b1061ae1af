import { describe, expect, it } from 'vitest';
import { DAY_START_MS, inventedDay } from '../../../tests/support/schedule/invented-day.ts';
import { contactOf, legOn } from '../../../tests/support/schedule/plan-builder.ts';
import { HOUR_MS, MINUTE_MS } from '../../time.ts';
import type { ContactModel, DayModel, RequestModel, RequirementModel } from '../model.ts';
import { gapsOf, longestGap } from './gaps.ts';
import { inHours, isoWeekday } from './hours.ts';
import { judgeRequests } from './requests.ts';
import { judgeRequirements } from './requirements.ts';

const day = inventedDay({ seed: 2, satellites: 4, missions: 2, hours: [0, 12] });
const line: RequirementModel = {
  id: 'line',
  missionId: 'm0',
  appliesTo: 'each',
  stationId: null,
  what: 'contacts',
  least: 2,
  most: null,
  minimumDurationSeconds: 120,
  uplink: 'none',
  leastUplinkMinutes: null,
  minimumElevationDeg: null,
  marginFloorDb: null,
  hoursUtc: null,
  weekdays: null,
  scanLossLimitDb: null,
};
const passesOf = (satelliteId: string) =>
  day.passes.filter((pass) => pass.satelliteId === satelliteId);
const at = (
  satelliteId: string,
  hour: number,
  minutes: number,
  uplinkMinutes = 0,
): ContactModel => {
  const pass = passesOf(satelliteId)[0];
  if (!pass) throw new Error('no pass');
  const fromMs = DAY_START_MS + hour * HOUR_MS;
  const span = { fromMs, toMs: fromMs + minutes * MINUTE_MS };
  const uplink = { fromMs, toMs: fromMs + uplinkMinutes * MINUTE_MS };
  const transmit = uplinkMinutes > 0 ? legOn('T1', uplink) : null;
  return contactOf(day, pass, {
    id: `${satelliteId}-${hour}`,
    receive: legOn('R1', span),
    transmit,
  });
};
const judged = (
  change: Partial<RequirementModel>,
  contacts: ContactModel[],
  neighbours: ContactModel[] = [],
) => judgeRequirements({ ...day, requirements: [{ ...line, ...change }], neighbours }, contacts);

describe('requirement lines', () => {
  it('count contacts of each satellite that are long enough', () => {
    const results = judged({}, [at('s0', 1, 5), at('s0', 3, 1.5), at('s0', 5, 2), at('s2', 6, 9)]);
    expect(results.map(({ satelliteId, given, met }) => [satelliteId, given, met])).toEqual([
      ['s0', 2, true],
      ['s2', 1, false],
    ]);
  });

  it('add up minutes and volume of all satellites together', () => {
    const contacts = [at('s0', 1, 5), at('s2', 3, 4)];
    const together = { appliesTo: 'together' as const };
    expect(judged({ ...together, what: 'minutes', least: 9 }, contacts)[0]).toMatchObject({
      given: 9,
      met: true,
    });
    // 1,000 kbit/s for 9 min are 540 Mbit.
    expect(judged({ ...together, what: 'volume', least: 541 }, contacts)[0]).toMatchObject({
      given: 540,
      met: false,
    });
  });

  it('want the uplink asked for and its minutes', () => {
    const wish = { uplink: 'required' as const, leastUplinkMinutes: 2, least: 1 };
    expect(judged(wish, [at('s0', 1, 5, 1.9)])[0]?.met).toBe(false);
    expect(judged(wish, [at('s0', 1, 5, 2)])[0]?.met).toBe(true);
  });

  it('count only contacts that begin in their hours, past midnight too', () => {
    const hours = { hoursUtc: [22, 2] as [number, number], least: 1 };
    expect(judged(hours, [at('s0', 1.99, 5)])[0]?.met).toBe(true);
    expect(judged(hours, [at('s0', 2, 5)])[0]?.met).toBe(false);
    expect(inHours({ weekdays: null, hoursUtc: [22, 2] }, DAY_START_MS + 22 * HOUR_MS)).toBe(true);
  });

  it('ask nothing on other weekdays; 2026-12-02 is a Wednesday', () => {
    expect(isoWeekday(DAY_START_MS)).toBe(3);
    expect(judged({ weekdays: [1, 2] }, [])).toEqual([]);
    expect(judged({ weekdays: [3] }, [])).toHaveLength(2);
  });

  it('tell a maximum that is exceeded, and still call the minimum met', () => {
    const most = judged({ least: 1, most: 1 }, [at('s0', 1, 5), at('s0', 3, 5)])[0];
    expect(most).toMatchObject({ given: 2, most: 1, met: true, exceeded: true });
  });

  it('count only the part above the line own elevation', () => {
    const pass = day.passes.find(
      ({ missionId, maxElevationDeg }) => missionId === 'm0' && maxElevationDeg > 40,
    );
    if (!pass) throw new Error('no high pass');
    const whole = legOn('R1', { fromMs: pass.fromMs, toMs: pass.toMs });
    const contact = contactOf(day, pass, { receive: whole });
    const minutes = (elevationDeg: number | null): number =>
      judged(
        { appliesTo: 'together', what: 'minutes', least: 1, minimumElevationDeg: elevationDeg },
        [contact],
      )[0]?.given ?? NaN;
    expect(minutes(null)).toBeCloseTo((pass.toMs - pass.fromMs) / MINUTE_MS, 3);
    expect(minutes(20)).toBeLessThan(minutes(10));
    expect(minutes(pass.maxElevationDeg + 1)).toBe(0);
  });
});

describe('gaps', () => {
  const hours = (from: number, to: number) => ({ fromMs: from * HOUR_MS, toMs: to * HOUR_MS });
  const length = (contacts: { fromMs: number; toMs: number }[]): number => {
    const gap = longestGap(gapsOf(hours(0, 24), contacts));
    return gap ? (gap.toMs - gap.fromMs) / HOUR_MS : 0;
  };
  it('reach from the last contact before to the first one after', () => {
    expect(length([hours(-3, -2), hours(10, 11), hours(30, 31)])).toBe(19);
    expect(length([hours(5, 6), hours(20, 21)])).toBe(14);
    expect(length([])).toBe(24);
  });
  it('do not open under overlapping contacts', () => {
    expect(length([hours(0, 12), hours(2, 3), hours(12, 24)])).toBe(0);
  });
});

describe('requests', () => {
  const request: RequestModel = {
    id: 'r',
    missionId: 'm0',
    satelliteId: 's0',
    kind: 'minutes',
    passId: null,
    minutes: 6,
    uplink: 'none',
    fromMs: DAY_START_MS,
    toMs: DAY_START_MS + 4 * HOUR_MS,
    priority: 1,
  };
  const met = (change: Partial<RequestModel>, contacts: ContactModel[]): boolean | undefined =>
    judgeRequests({ ...day, requests: [{ ...request, ...change }] } satisfies DayModel, contacts)[0]
      ?.met;
  it('add minutes before the deadline only', () => {
    expect(met({}, [at('s0', 1, 4), at('s0', 3, 2)])).toBe(true);
    expect(met({}, [at('s0', 1, 4), at('s0', 3.98, 5)])).toBe(false);
    expect(met({ uplink: 'required' }, [at('s0', 1, 9)])).toBe(false);
  });
  it('ask for a pass, or for silence', () => {
    const passId = passesOf('s0')[0]?.id ?? '';
    expect(met({ kind: 'pass', passId }, [at('s0', 1, 4)])).toBe(true);
    expect(met({ kind: 'pass', passId: 'another' }, [at('s0', 1, 4)])).toBe(false);
    expect(met({ kind: 'none' }, [at('s0', 1, 4)])).toBe(false);
    expect(met({ kind: 'none' }, [at('s2', 1, 4)])).toBe(true);
  });
});
