/**
 * Who may do what, in which state: one table for the server's check and the client's buttons.
 * An action without `states` does not depend on a plan; `own` narrows it to missions the person leads.
 */
import type { PlanState } from './schemas/plan.ts';
import type { Role } from './schemas/session.ts';

export interface Actor {
  id: string;
  roles: readonly Role[];
  leadsMissionIds: readonly string[];
}

/** What the question is about; only the members that the action's row looks at are needed. */
export interface Subject {
  state?: PlanState;
  missionId?: string | null;
  submittedById?: string | null;
}

interface Row {
  /** Roles that may do it with any mission. */
  roles: readonly Role[];
  /** Leads may do it with their own missions. */
  ownMissions?: true;
  states?: readonly PlanState[];
  /** Four eyes: not by the person who submitted. */
  notSubmitter?: true;
}

const everyone: readonly Role[] = ['operator', 'scheduler', 'lead', 'administrator'];
const crew: readonly Role[] = ['operator', 'scheduler'];

export const POLICY = {
  'session.use': { roles: everyone },
  'see.plan-side': { roles: everyone },
  'see.everything': { roles: ['operator', 'scheduler', 'administrator'] },
  'see.audit': { roles: everyone },
  'see.mails': { roles: ['administrator'] },
  'see.users': { roles: ['administrator'] },
  'edit.users': { roles: ['administrator'] },
  'edit.stations': { roles: ['administrator'] },
  'edit.faces': { roles: ['administrator'] },
  'edit.channels': { roles: ['administrator'] },
  'edit.missions': { roles: ['administrator'], ownMissions: true },
  'create.missions': { roles: ['administrator'] },
  'edit.requirements': { roles: ['administrator'], ownMissions: true },
  'edit.requests': { roles: ['administrator'], ownMissions: true },
  'edit.satellites': { roles: crew },
  'upload.element-sets': { roles: crew, ownMissions: true },
  'withdraw.element-sets': { roles: crew, ownMissions: true },
  'run.predictions': { roles: crew },
  'edit.closures': { roles: ['operator', 'scheduler', 'administrator'] },
  'inhibit.transmit': { roles: ['operator', 'scheduler', 'administrator'] },
  'log.contacts': { roles: crew },
  'create.plans': { roles: ['scheduler'] },
  'plan.edit': { roles: ['scheduler'], states: ['draft'] },
  'plan.assign': { roles: ['scheduler'], states: ['draft'] },
  'plan.set-limit': { roles: ['scheduler'], states: ['draft'] },
  'plan.submit': { roles: ['scheduler'], states: ['draft'] },
  'plan.withdraw': { roles: ['scheduler'], states: ['in-review', 'approved'] },
  'plan.release': { roles: ['scheduler'], states: ['approved', 'in-review'] },
  'plan.revise': { roles: ['scheduler'], states: ['released'] },
  'plan.sign': { roles: [], ownMissions: true, states: ['in-review'], notSubmitter: true },
  'plan.operate': { roles: crew, states: ['released'] },
} as const satisfies Record<string, Row>;

export type Action = keyof typeof POLICY;
export const ACTIONS = Object.keys(POLICY) as Action[];

const rowOf = (action: Action): Row => POLICY[action];

const holds = (actor: Actor, row: Row, subject: Subject): boolean => {
  if (row.roles.some((role) => actor.roles.includes(role))) return true;
  if (!row.ownMissions || !actor.roles.includes('lead')) return false;
  if (subject.missionId === undefined) return actor.leadsMissionIds.length > 0;
  return subject.missionId !== null && actor.leadsMissionIds.includes(subject.missionId);
};

/** May the person do it at all (whatever the state)? Answers 403 against 409. */
export const mayEver = (actor: Actor, action: Action, subject: Subject = {}): boolean => {
  const row = rowOf(action);
  if (!holds(actor, row, subject)) return false;
  return !(row.notSubmitter && subject.submittedById === actor.id);
};

/** Does the state allow it, whoever asks? */
export const stateAllows = (action: Action, state: PlanState): boolean =>
  rowOf(action).states?.includes(state) ?? true;

/** May the person do it now? */
export const can = (actor: Actor, action: Action, subject: Subject = {}): boolean =>
  mayEver(actor, action, subject) &&
  (subject.state === undefined || stateAllows(action, subject.state));

/** A lead who holds no other role sees the details of own missions only. */
export const seesMission = (actor: Actor, missionId: string | null): boolean =>
  mayEver(actor, 'see.everything') ||
  (missionId !== null && actor.leadsMissionIds.includes(missionId));

/** Permissions that depend on no object, for the session answer and the navigation. */
export const permissionsOf = (actor: Actor): Action[] =>
  ACTIONS.filter((action) => mayEver(actor, action));
