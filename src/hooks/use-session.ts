import { useQuery } from '@tanstack/react-query';
import { can, mayEver, type Action, type Actor, type Subject } from '../../shared/policy.ts';
import type { Role, SessionUser } from '../../shared/schemas/session.ts';
import { sessionQueries } from '../queries/session-queries.ts';

const nobody: Actor = { id: '', roles: [], leadsMissionIds: [] };

/** The person at the screen; below the shell there always is one. */
export function useUser(): SessionUser | null {
  return useQuery(sessionQueries.current()).data?.user ?? null;
}

/** The policy table, asked for the person at the screen. */
export function useMay(): {
  may: (action: Action, subject?: Subject) => boolean;
  mayEver: (action: Action, subject?: Subject) => boolean;
  actor: Actor;
} {
  const actor: Actor = useUser() ?? nobody;
  return {
    actor,
    may: (action, subject) => can(actor, action, subject),
    mayEver: (action, subject) => mayEver(actor, action, subject),
  };
}

const ROLE_WORDS: Record<Role, string> = {
  operator: 'Operator',
  scheduler: 'Scheduler',
  lead: 'Mission lead',
  administrator: 'Administrator',
};
export const roleWords = (roles: readonly Role[]): string =>
  roles.map((role) => ROLE_WORDS[role]).join(', ');
