import type { Contact } from '../../../../../shared/schemas/plan.ts';
import { Button } from '../../../../components/button.tsx';
import { usePlanDesk } from '../../hooks/plan-desk.ts';
import { usePlanEdits } from '../../hooks/plan-edits.ts';
import { usePlanView } from '../../hooks/plan-view.ts';

/** Move, trim, lock, take off: the same four everywhere. */
export function ContactActions({ contact }: { contact: Contact }) {
  const { allows } = usePlanDesk();
  const { open, apply, isBusy } = usePlanEdits();
  const { selectContact } = usePlanView();
  if (allows('operate'))
    return (
      <Foot>
        <Button
          size="small"
          icon="move"
          onClick={() => open({ kind: 'operate', contactId: contact.id })}
        >
          Change the running day
        </Button>
      </Foot>
    );
  if (!allows('edit')) return null;
  const lock = (): void =>
    apply(
      [{ op: 'change', contactId: contact.id, locked: !contact.locked }],
      `${contact.satelliteName} ${contact.locked ? 'unlocked' : 'locked'}.`,
    );
  const takeOff = (): void => {
    selectContact(null);
    apply(
      [{ op: 'remove', contactId: contact.id }],
      `${contact.satelliteName} taken off the plan.`,
    );
  };
  return (
    <Foot>
      <Button
        size="small"
        icon="move"
        disabled={isBusy}
        onClick={() => open({ kind: 'change', contactId: contact.id, focus: 'channel' })}
      >
        Move
      </Button>
      <Button
        size="small"
        icon="trim"
        disabled={isBusy}
        onClick={() => open({ kind: 'change', contactId: contact.id, focus: 'times' })}
      >
        Trim
      </Button>
      <Button
        size="small"
        icon={contact.locked ? 'unlock' : 'lock'}
        disabled={isBusy}
        onClick={lock}
      >
        {contact.locked ? 'Unlock' : 'Lock'}
      </Button>
      <Button size="small" variant="quiet" className="ml-auto" disabled={isBusy} onClick={takeOff}>
        Take off
      </Button>
    </Foot>
  );
}

const Foot = ({ children }: { children: React.ReactNode }) => (
  <div className="flex shrink-0 items-center gap-2 border-t border-line px-4.5 py-2.5">
    {children}
  </div>
);
