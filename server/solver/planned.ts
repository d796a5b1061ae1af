import type { ContactModel, DayModel, Facts } from '../../shared/schedule/model.ts';

/** A contact of a solved plan; the id of a contact of the current plan is kept, a new one has none yet. */
export type SolvedContact = Omit<ContactModel, 'id'> & { id: string | null };

export interface SolveInput {
  day: DayModel;
  facts: Facts;
  /** The contacts that stand in the plan now; locked ones stay. */
  current: ContactModel[];
  mode: 'new' | 'repair';
  timeLimitSeconds: number;
  /** Contacts of the last released revision, whose channels are kept where there is a choice. */
  previous?: ContactModel[];
}

/** A lock that could not hold, and why in a sentence. */
export interface LockSetAside {
  contactId: string;
  words: string;
}

export interface PlanChanges {
  kept: number;
  /** Same times and face on another channel. */
  channelOnly: number;
  changed: number;
  added: number;
  removed: number;
  missionIds: string[];
  minutesBefore: number;
  minutesAfter: number;
  newlyMet: string[];
  newlyMissed: string[];
  words: string;
}

export type Provenance = 'proven' | 'time-limit' | 'heuristic' | 'cancelled';

export interface SolveResult {
  contacts: SolvedContact[];
  /** Weighted minutes: downlink minutes times the weight of the mission, a quarter for wanted uplink. */
  objective: number;
  /** Proven upper bound of it among plans on the grid that meet the minimums as well; null: none is known. */
  bound: number | null;
  gap: number | null;
  provenance: Provenance;
  seconds: number;
  columns: number;
  /** Step of the hand-over instants of trimmed contacts in the model; null: nothing had to be trimmed. */
  gridSeconds: number | null;
  /** What a scheduler reads: how good the plan is, what it misses, what limited the run. */
  words: string;
  changes: PlanChanges;
  locksSetAside: LockSetAside[];
}
