// placeholder while the solver is being written
import type { ContactModel, DayModel, Facts } from '../../shared/schedule/model.ts';
export type SolvedContact = Omit<ContactModel, 'id'> & { id: string | null };
export const solveDay = (
  _i: {
    day: DayModel;
    facts: Facts;
    current: readonly ContactModel[];
    mode: string;
    timeLimitSeconds: number;
  },
  _o: { signal: AbortSignal; onProgress: (f: number, s: string) => void },
): Promise<{
  contacts: SolvedContact[];
  objective: number;
  bound: number | null;
  gap: number | null;
  provenance: string;
  seconds: number;
  columns: number;
  words: string;
  changes: unknown;
}> => Promise.reject(new Error('not yet'));
