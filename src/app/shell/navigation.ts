import type { Action } from '../../../shared/policy.ts';
import { paths } from '../paths.ts';

interface Entry {
  to: string;
  word: string;
  /** Shown to those who may. */
  needs: Action;
}

export const NAVIGATION: readonly Entry[] = [
  { to: paths.plans, word: 'Day plan', needs: 'see.plan-side' },
  { to: paths.shift, word: 'Shift', needs: 'log.contacts' },
  { to: paths.passes, word: 'Passes', needs: 'see.plan-side' },
  { to: paths.elementSets, word: 'Element sets', needs: 'see.plan-side' },
  { to: paths.satellites, word: 'Satellites', needs: 'see.plan-side' },
  { to: paths.missions, word: 'Missions', needs: 'see.plan-side' },
  { to: paths.stations, word: 'Station', needs: 'see.plan-side' },
  { to: paths.people, word: 'People', needs: 'see.users' },
  { to: paths.audit, word: 'Audit', needs: 'see.audit' },
  { to: paths.mails, word: 'Mail', needs: 'see.mails' },
];
