import { createContext, use } from 'react';
import type { Edit } from '../../../../shared/schemas/edit.ts';

export type PlanDialog =
  | { kind: 'change'; contactId: string; focus: 'channel' | 'times' }
  | { kind: 'assign'; passId: string; channelId?: string }
  | { kind: 'assignment' }
  | { kind: 'limit' }
  | { kind: 'submit' }
  | { kind: 'withdraw' }
  | { kind: 'release' }
  | { kind: 'revise' }
  | { kind: 'operate'; contactId: string }
  | { kind: 'keys' };

export interface PlanEdits {
  /** Makes edits, all or none; what breaks a rule is refused and named. `words` say what was done. */
  apply: (edits: Edit[], words: string, options?: ApplyOptions) => void;
  undo: () => void;
  redo: () => void;
  canUndo: boolean;
  canRedo: boolean;
  isBusy: boolean;
  dialog: PlanDialog | null;
  open: (dialog: PlanDialog) => void;
  close: () => void;
  runId: string | null;
  setRunId: (id: string | null) => void;
}
export interface ApplyOptions {
  /** The version on which the edit was thought out; an older one is refused as stale. */
  version?: number;
  onDone?: () => void;
}

export const PlanEditsContext = createContext<PlanEdits | null>(null);

export function usePlanEdits(): PlanEdits {
  const edits = use(PlanEditsContext);
  if (!edits) throw new Error('A part of the plan stands outside its edits');
  return edits;
}
