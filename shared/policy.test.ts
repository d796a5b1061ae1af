import { describe, expect, it } from 'vitest';
import {
  ACTIONS,
  can,
  mayEver,
  permissionsOf,
  seesMission,
  stateAllows,
  type Action,
  type Actor,
} from './policy.ts';
import { PlanState } from './schemas/plan.ts';

const person = (...roles: Actor['roles']): Actor => ({
  id: 'me',
  roles,
  leadsMissionIds: roles.includes('lead') ? ['mine'] : [],
});
const PEOPLE = {
  operator: person('operator'),
  scheduler: person('scheduler'),
  lead: person('lead'),
  administrator: person('administrator'),
};
type Role = keyof typeof PEOPLE;

/** DESIGN section 7, written down a second time by hand: who may, for a subject of an own mission. */
const WHO: Record<Action, Role[]> = {
  'session.use': ['operator', 'scheduler', 'lead', 'administrator'],
  'see.plan-side': ['operator', 'scheduler', 'lead', 'administrator'],
  'see.everything': ['operator', 'scheduler', 'administrator'],
  'see.audit': ['operator', 'scheduler', 'lead', 'administrator'],
  'see.mails': ['administrator'],
  'see.users': ['administrator'],
  'edit.users': ['administrator'],
  'edit.stations': ['administrator'],
  'edit.faces': ['administrator'],
  'edit.channels': ['administrator'],
  'edit.missions': ['lead', 'administrator'],
  'create.missions': ['administrator'],
  'edit.requirements': ['lead', 'administrator'],
  'edit.requests': ['lead', 'administrator'],
  'edit.satellites': ['operator', 'scheduler'],
  'upload.element-sets': ['operator', 'scheduler', 'lead'],
  'withdraw.element-sets': ['operator', 'scheduler', 'lead'],
  'run.predictions': ['operator', 'scheduler'],
  'edit.closures': ['operator', 'scheduler', 'administrator'],
  'inhibit.transmit': ['operator', 'scheduler', 'administrator'],
  'log.contacts': ['operator', 'scheduler'],
  'create.plans': ['scheduler'],
  'plan.edit': ['scheduler'],
  'plan.assign': ['scheduler'],
  'plan.set-limit': ['scheduler'],
  'plan.submit': ['scheduler'],
  'plan.withdraw': ['scheduler'],
  'plan.release': ['scheduler'],
  'plan.revise': ['scheduler'],
  'plan.sign': ['lead'],
  'plan.operate': ['operator', 'scheduler'],
};

/** DESIGN section 4: the states in which a step of a plan's life is possible at all. */
const WHEN: Partial<Record<Action, PlanState[]>> = {
  'plan.edit': ['draft'],
  'plan.assign': ['draft'],
  'plan.set-limit': ['draft'],
  'plan.submit': ['draft'],
  'plan.withdraw': ['in-review', 'approved'],
  'plan.release': ['in-review', 'approved'],
  'plan.revise': ['released'],
  'plan.sign': ['in-review'],
  'plan.operate': ['released'],
};

const cases = ACTIONS.flatMap((action) =>
  (Object.keys(PEOPLE) as Role[]).flatMap((role) =>
    PlanState.options.map((state) => ({ action, role, state })),
  ),
);

describe('the policy table', () => {
  it('has a row for every action of the list', () => {
    expect(ACTIONS.toSorted()).toEqual(Object.keys(WHO).toSorted());
  });

  it.each(cases)('$role, $action, $state', ({ action, role, state }) => {
    const may = WHO[action].includes(role) && (WHEN[action]?.includes(state) ?? true);
    expect(can(PEOPLE[role], action, { state, missionId: 'mine', submittedById: 'else' })).toBe(
      may,
    );
    expect(stateAllows(action, state)).toBe(WHEN[action]?.includes(state) ?? true);
  });

  it('a lead acts for own missions only', () => {
    for (const action of [
      'edit.missions',
      'edit.requirements',
      'edit.requests',
      'plan.sign',
    ] as const)
      expect(mayEver(PEOPLE.lead, action, { missionId: 'foreign' })).toBe(false);
    expect(mayEver(PEOPLE.lead, 'upload.element-sets', { missionId: null })).toBe(false);
    expect(mayEver({ ...PEOPLE.lead, leadsMissionIds: [] }, 'edit.requests')).toBe(false);
  });

  it('who submitted never signs, whatever other roles there are', () => {
    const both = person('scheduler', 'lead');
    const subject = { state: 'in-review' as const, missionId: 'mine' };
    expect(can(both, 'plan.sign', { ...subject, submittedById: 'me' })).toBe(false);
    expect(can(both, 'plan.sign', { ...subject, submittedById: 'else' })).toBe(true);
  });

  it('several roles add up, and none are nothing', () => {
    expect(permissionsOf(person('operator', 'administrator'))).toContain('edit.users');
    expect(permissionsOf(person())).toEqual([]);
  });

  it('a lead with another role sees everything, without one own missions', () => {
    expect(seesMission(PEOPLE.lead, 'mine')).toBe(true);
    expect(seesMission(PEOPLE.lead, 'foreign')).toBe(false);
    expect(seesMission(PEOPLE.lead, null)).toBe(false);
    expect(seesMission(person('lead', 'operator'), 'foreign')).toBe(true);
  });
});
