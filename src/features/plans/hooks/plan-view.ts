import { createContext, use } from 'react';
import type { Interval } from '../../../../shared/time.ts';

export type PlanViewName = 'calendar' | 'sky' | 'map' | 'table';

/** One selected stretch, one instant, one selection: every panel of the plan shares them, and the URL holds them. */
export interface PlanView {
  view: PlanViewName;
  setView: (view: PlanViewName) => void;
  /** The stretch that the calendar shows. */
  stretch: Interval;
  /** `done`: the movement is over and the URL takes it. */
  setStretch: (stretch: Interval, done: boolean) => void;
  instantMs: number;
  setInstant: (ms: number, done: boolean) => void;
  contactId: string | null;
  passId: string | null;
  selectContact: (id: string | null) => void;
  selectPass: (id: string | null) => void;
  /** Selects a contact and brings its time into view. */
  showContact: (id: string, interval: Interval) => void;
  showPass: (id: string, interval: Interval) => void;
}

export const PlanViewContext = createContext<PlanView | null>(null);

export function usePlanView(): PlanView {
  const view = use(PlanViewContext);
  if (!view) throw new Error('A part of the plan stands outside its view');
  return view;
}
