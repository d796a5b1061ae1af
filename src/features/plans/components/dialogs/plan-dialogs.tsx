import { usePlanDesk } from '../../hooks/plan-desk.ts';
import { usePlanEdits } from '../../hooks/plan-edits.ts';
import { openContact } from '../../model/plan-legs.ts';
import { AssignDialog } from './assign-dialog.tsx';
import { AssignmentDialog } from './assignment-dialog.tsx';
import { ChangeDialog } from './change-dialog.tsx';
import { KeysDialog } from './keys-dialog.tsx';
import { ReleaseDialog, ReviseDialog, SubmitDialog, WithdrawDialog } from './life-dialogs.tsx';
import { LimitDialog } from './limit-dialog.tsx';
import { OperateDialog } from './operate-dialog.tsx';

/** The dialog that is open, whichever part of the page opened it. */
export function PlanDialogs() {
  const { dialog, close } = usePlanEdits();
  const { contacts, openPasses } = usePlanDesk();
  switch (dialog?.kind) {
    case undefined:
      return null;
    case 'change': {
      const contact = openContact(contacts.get(dialog.contactId));
      return contact && <ChangeDialog contact={contact} focus={dialog.focus} onClose={close} />;
    }
    case 'operate': {
      const contact = openContact(contacts.get(dialog.contactId));
      return contact && <OperateDialog contact={contact} onClose={close} />;
    }
    case 'assign': {
      const pass = openPasses?.find(({ passId }) => passId === dialog.passId);
      return pass ? (
        <AssignDialog pass={pass} channelId={dialog.channelId ?? null} onClose={close} />
      ) : null;
    }
    case 'assignment':
      return <AssignmentDialog onClose={close} />;
    case 'limit':
      return <LimitDialog onClose={close} />;
    case 'submit':
      return <SubmitDialog onClose={close} />;
    case 'withdraw':
      return <WithdrawDialog onClose={close} />;
    case 'release':
      return <ReleaseDialog onClose={close} />;
    case 'revise':
      return <ReviseDialog onClose={close} />;
    case 'keys':
      return <KeysDialog onClose={close} />;
  }
}
