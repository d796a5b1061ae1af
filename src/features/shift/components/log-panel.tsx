import { useState, type SyntheticEvent } from 'react';
import type { PutContactLog } from '../../../../shared/schemas/contact-log.ts';
import { MINUTE_MS } from '../../../../shared/time.ts';
import { useAnnounce } from '../../../components/announcer.tsx';
import { Button } from '../../../components/button.tsx';
import { Dialog } from '../../../components/dialog.tsx';
import { SelectField, TextAreaField, TextField } from '../../../components/field.tsx';
import { Panel } from '../../../components/panel.tsx';
import { EmptyState, ErrorNote } from '../../../components/states.tsx';
import { asNumber } from '../../../lib/form-errors.ts';
import { clockSpan } from '../../../lib/format-time.ts';
import { useLogContact } from '../../../queries/plan-queries.ts';
import type { ShiftContact } from '../shift-contacts.ts';

interface Props {
  contacts: readonly ShiftContact[];
  mayLog: boolean;
}

const minutesOf = ({ fromMs, toMs }: ShiftContact): number =>
  Math.round(((toMs - fromMs) / MINUTE_MS) * 10) / 10;

/** What is over and waits for somebody to say how it went. */
export function LogPanel({ contacts, mayLog }: Props) {
  const log = useLogContact();
  const announce = useAnnounce();
  const [open, setOpen] = useState<ShiftContact | null>(null);
  const served = (one: ShiftContact): void =>
    log.mutate(
      {
        contactId: one.contact.id,
        body: { outcome: 'served', cause: '', minutes: minutesOf(one), volumeMbit: null, note: '' },
      },
      { onSuccess: () => announce(`${one.contact.satelliteName} is logged as served.`) },
    );
  return (
    <Panel title="To be logged" aside={contacts.length > 0 && String(contacts.length)}>
      <ErrorNote error={log.error} />
      {contacts.length === 0 ? (
        <EmptyState icon="approve" title="Everything is logged" />
      ) : (
        <ul className="flex flex-col">
          {contacts.slice(0, 12).map((one) => (
            <li
              key={one.contact.id}
              className="flex flex-wrap items-center gap-2 border-b border-line-soft py-2 last:border-b-0"
            >
              <span className="min-w-0 flex-1">
                <span className="block text-table font-semibold">{one.contact.satelliteName}</span>
                <span className="figures block text-caption text-ink-muted">
                  {clockSpan(one.fromMs, one.toMs)} UTC
                </span>
              </span>
              {mayLog && (
                <>
                  <Button
                    size="small"
                    icon="approve"
                    busy={log.isPending && log.variables.contactId === one.contact.id}
                    onClick={() => served(one)}
                  >
                    Served <span className="sr-only">{one.contact.satelliteName}</span>
                  </Button>
                  <Button size="small" variant="quiet" onClick={() => setOpen(one)}>
                    Otherwise <span className="sr-only">{one.contact.satelliteName}</span>
                  </Button>
                </>
              )}
            </li>
          ))}
        </ul>
      )}
      {open && <LogDialog subject={open} onClose={() => setOpen(null)} />}
    </Panel>
  );
}

const OUTCOMES: [PutContactLog['outcome'], string][] = [
  ['partly', 'Partly served'],
  ['lost', 'Lost'],
  ['not-attempted', 'Not attempted'],
  ['served', 'Served'],
];

function LogDialog({ subject, onClose }: { subject: ShiftContact; onClose: () => void }) {
  const log = useLogContact();
  const announce = useAnnounce();
  const [outcome, setOutcome] = useState<PutContactLog['outcome']>('partly');
  const [cause, setCause] = useState('');
  const [minutes, setMinutes] = useState('');
  const [volume, setVolume] = useState('');
  const [note, setNote] = useState('');
  const submit = (event: SyntheticEvent): void => {
    event.preventDefault();
    log.mutate(
      {
        contactId: subject.contact.id,
        body: { outcome, cause, minutes: asNumber(minutes), volumeMbit: asNumber(volume), note },
      },
      {
        onSuccess: () => {
          announce(`${subject.contact.satelliteName} is logged.`);
          onClose();
        },
      },
    );
  };
  return (
    <Dialog
      open
      onClose={onClose}
      title={`How did ${subject.contact.satelliteName} go?`}
      description={`${clockSpan(subject.fromMs, subject.toMs)} UTC, ${minutesOf(subject)} min planned`}
    >
      <form noValidate className="flex flex-col gap-3.5" onSubmit={submit}>
        <SelectField
          label="Outcome"
          value={outcome}
          onChange={(event) =>
            setOutcome(OUTCOMES.find(([value]) => value === event.target.value)?.[0] ?? 'partly')
          }
        >
          {OUTCOMES.map(([value, word]) => (
            <option key={value} value={value}>
              {word}
            </option>
          ))}
        </SelectField>
        <TextField label="Cause" value={cause} onChange={(event) => setCause(event.target.value)} />
        <div className="grid grid-cols-2 gap-3">
          <TextField
            label="Served"
            unit="min"
            inputMode="decimal"
            value={minutes}
            onChange={(event) => setMinutes(event.target.value)}
          />
          <TextField
            label="Volume"
            unit="Mbit"
            inputMode="decimal"
            value={volume}
            onChange={(event) => setVolume(event.target.value)}
          />
        </div>
        <TextAreaField
          label="Note"
          value={note}
          onChange={(event) => setNote(event.target.value)}
        />
        <ErrorNote error={log.error} />
        <div className="flex justify-end gap-2">
          <Button onClick={onClose}>Later</Button>
          <Button type="submit" variant="primary" busy={log.isPending}>
            Log it
          </Button>
        </div>
      </form>
    </Dialog>
  );
}
