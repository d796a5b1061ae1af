import type { PlanState } from '../../shared/schemas/plan.ts';
import type { ElementSet } from '../../shared/schemas/element-set.ts';
import { Chip, type Tone } from './chip.tsx';
import type { IconName } from './icon.tsx';

type Look = [Tone, IconName, string];

const PLAN: Record<PlanState, Look> = {
  draft: ['neutral', 'pencil', 'Draft'],
  'in-review': ['info', 'inReview', 'In review'],
  approved: ['ok', 'approve', 'Approved'],
  released: ['info', 'release', 'Released'],
  superseded: ['neutral', 'layers', 'Superseded'],
};

/** A draft that came back from a lead is shown as returned. */
export function PlanStateChip({ state, returned }: { state: PlanState; returned?: boolean }) {
  const [tone, icon, word]: Look =
    state === 'draft' && returned ? ['warn', 'returned', 'Returned'] : PLAN[state];
  return (
    <Chip tone={tone} icon={icon}>
      {word}
    </Chip>
  );
}

const ELEMENTS: Record<ElementSet['state'], Look> = {
  'in-use': ['ok', 'approve', 'In use'],
  candidate: ['info', 'clock', 'Waiting'],
  former: ['neutral', 'layers', 'Former'],
  withdrawn: ['warn', 'returned', 'Withdrawn'],
  unassigned: ['neutral', 'hash', 'Unassigned'],
};

export function ElementStateChip({ state }: { state: ElementSet['state'] }) {
  const [tone, icon, word] = ELEMENTS[state];
  return (
    <Chip tone={tone} icon={icon}>
      {word}
    </Chip>
  );
}
