import type { Edit } from '../../../../../shared/schemas/edit.ts';
import type { Contact } from '../../../../../shared/schemas/plan.ts';
import type { Violation } from '../../../../../shared/schemas/problem.ts';
import { Button } from '../../../../components/button.tsx';
import { usePlanDesk } from '../../hooks/plan-desk.ts';
import { usePlanEdits } from '../../hooks/plan-edits.ts';
import { useJudgement } from '../../hooks/use-judgement.ts';
import { openContact } from '../../model/plan-legs.ts';

interface Props {
  contact: Contact;
  wanted: string;
  violations: readonly Violation[];
  onDone: () => void;
}

/** Where one contact holds the wanted channel: both change places, judged as one edit. */
export function SwapOffer({ contact, wanted, violations, onDone }: Props) {
  const { plan, contacts, labelOf } = usePlanDesk();
  const { apply, isBusy } = usePlanEdits();
  const busyWith = violations
    .filter(({ rule }) => rule === 'channel-busy')
    .flatMap(({ contactIds }) => contactIds)
    .filter((id) => id !== contact.id);
  const others = [...new Set(busyWith)].flatMap((id) => openContact(contacts.get(id)) ?? []);
  const other = others.length === 1 && others[0]?.receive.channelId === wanted ? others[0] : null;
  const edits: Edit[] | null = other && [
    { op: 'change', contactId: contact.id, receive: { channelId: wanted } },
    { op: 'change', contactId: other.id, receive: { channelId: contact.receive.channelId } },
  ];
  const judgement = useJudgement(plan, edits);
  if (!other || !edits || judgement.state !== 'holds') return null;
  const words = `${contact.satelliteName} and ${other.satelliteName} change places: ${labelOf(wanted)} and ${labelOf(contact.receive.channelId)}.`;
  return (
    <div className="mt-3 flex items-center gap-3">
      <p className="min-w-0 flex-1">{words} Every rule holds.</p>
      <Button icon="swap" busy={isBusy} onClick={() => apply(edits, words, { onDone })}>
        Swap
      </Button>
    </div>
  );
}
