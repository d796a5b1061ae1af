import { useState } from 'react';
import { Button } from './button.tsx';
import { Dialog } from './dialog.tsx';
import { TextAreaField } from './field.tsx';
import { ErrorNote } from './states.tsx';

interface Props {
  open: boolean;
  onClose: () => void;
  title: string;
  description: string;
  label: string;
  action: string;
  busy: boolean;
  error: unknown;
  onSubmit: (reason: string) => void;
  /** Least length; 0: a reason may be left out. */
  least?: number;
}

/** A step that is hard to undo: what it does, the reason, and the way back first. */
export function ReasonDialog(props: Props) {
  return (
    <Dialog
      open={props.open}
      onClose={props.onClose}
      title={props.title}
      description={props.description}
    >
      {props.open && <ReasonForm {...props} />}
    </Dialog>
  );
}

function ReasonForm({ onClose, label, action, busy, error, onSubmit, least = 3 }: Props) {
  const [reason, setReason] = useState('');
  const [tried, setTried] = useState(false);
  const short = reason.trim().length < least;
  return (
    <form
      onSubmit={(event) => {
        event.preventDefault();
        setTried(true);
        if (!short) onSubmit(reason.trim());
      }}
    >
      <TextAreaField
        label={label}
        value={reason}
        maxLength={2000}
        onChange={(event) => setReason(event.target.value)}
        error={tried && short ? 'Say why, in a few words' : undefined}
      />
      <div className="mt-3">
        <ErrorNote error={error} />
      </div>
      <div className="mt-4 flex justify-end gap-2">
        <Button onClick={onClose}>Keep as it is</Button>
        <Button type="submit" variant="primary" busy={busy}>
          {action}
        </Button>
      </div>
    </form>
  );
}
