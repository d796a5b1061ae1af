import { useState, type SyntheticEvent } from 'react';
import type { Channel } from '../../../../shared/schemas/channel.ts';
import type { OperationalChange } from '../../../../shared/schemas/edit.ts';
import { dayStart } from '../../../../shared/time.ts';
import { useAnnounce } from '../../../components/announcer.tsx';
import { Button } from '../../../components/button.tsx';
import { Dialog } from '../../../components/dialog.tsx';
import { SelectField, TextField } from '../../../components/field.tsx';
import { ErrorNote } from '../../../components/states.tsx';
import { clockSeconds, clockSpan, readClock } from '../../../lib/format-time.ts';
import { toIso } from '../../../../shared/time.ts';
import { useOperatePlan } from '../../../queries/plan-queries.ts';
import type { ShiftContact } from '../shift-contacts.ts';

interface Props {
  subject: ShiftContact;
  channels: readonly Channel[];
  onClose: () => void;
}
type Kind = 'move-leg' | 'shorten' | 'cancel';

/** Repairs the running day: in force at once, with reason and caller, judged by the same rules. */
export function OperateDialog({ subject, channels, onClose }: Props) {
  const { contact, plan } = subject;
  const operate = useOperatePlan();
  const announce = useAnnounce();
  const [kind, setKind] = useState<Kind>('move-leg');
  const [leg, setLeg] = useState<'receive' | 'transmit'>('receive');
  const fitting = channels.filter((one) => one.direction === leg && one.faceId === contact.faceId);
  const current = contact[leg]?.channelId;
  const others = fitting.filter((one) => one.id !== current);
  const [channelId, setChannelId] = useState('');
  const [from, setFrom] = useState(clockSeconds(subject.fromMs));
  const [to, setTo] = useState(clockSeconds(subject.toMs));
  const [reason, setReason] = useState('');
  const [caller, setCaller] = useState('');

  const changeOf = (): OperationalChange | null => {
    const common = { contactId: contact.id, reason, caller };
    if (kind === 'cancel') return { kind, ...common };
    if (kind === 'move-leg')
      return { kind, ...common, direction: leg, channelId: channelId || (others[0]?.id ?? '') };
    const dayMs = dayStart(subject.fromMs);
    const fromMs = readClock(from, dayMs);
    const toMs = readClock(to, dayMs);
    if (fromMs === null || toMs === null) return null;
    return { kind, ...common, fromUtc: toIso(fromMs), toUtc: toIso(toMs) };
  };
  const submit = (event: SyntheticEvent): void => {
    event.preventDefault();
    const change = changeOf();
    if (!change) return;
    operate.mutate(
      { plan, change },
      {
        onSuccess: ({ revision }) => {
          announce(`Revision ${revision} is in force.`);
          onClose();
        },
      },
    );
  };
  return (
    <Dialog
      open
      onClose={onClose}
      title={`Change ${contact.satelliteName}`}
      description={`${clockSpan(subject.fromMs, subject.toMs)} UTC. In force at once; the missions concerned are told.`}
    >
      <form noValidate className="flex flex-col gap-3.5" onSubmit={submit}>
        <SelectField
          label="What"
          value={kind}
          onChange={(event) =>
            setKind(
              event.target.value === 'cancel' || event.target.value === 'shorten'
                ? event.target.value
                : 'move-leg',
            )
          }
        >
          <option value="move-leg">Move to another channel</option>
          <option value="shorten">Shorten</option>
          <option value="cancel">Cancel the contact</option>
        </SelectField>
        {kind === 'move-leg' && (
          <div className="grid grid-cols-2 gap-3">
            <SelectField
              label="Leg"
              value={leg}
              onChange={(event) => {
                setLeg(event.target.value === 'transmit' ? 'transmit' : 'receive');
                setChannelId('');
              }}
            >
              <option value="receive">Receive</option>
              {contact.transmit && <option value="transmit">Transmit</option>}
            </SelectField>
            <SelectField
              label="To channel"
              value={channelId || (others[0]?.id ?? '')}
              onChange={(event) => setChannelId(event.target.value)}
            >
              {others.map(({ id, label }) => (
                <option key={id} value={id}>
                  {label}
                </option>
              ))}
            </SelectField>
          </div>
        )}
        {kind === 'shorten' && (
          <div className="grid grid-cols-2 gap-3">
            <TextField
              label="From"
              unit="UTC"
              value={from}
              onChange={(event) => setFrom(event.target.value)}
            />
            <TextField
              label="To"
              unit="UTC"
              value={to}
              onChange={(event) => setTo(event.target.value)}
            />
          </div>
        )}
        <TextField
          label="Reason"
          value={reason}
          onChange={(event) => setReason(event.target.value)}
        />
        <TextField
          label="Caller"
          hint="Who asked for it, if somebody called"
          value={caller}
          onChange={(event) => setCaller(event.target.value)}
        />
        <ErrorNote error={operate.error} />
        <div className="flex justify-end gap-2">
          <Button onClick={onClose}>Keep as it is</Button>
          <Button
            type="submit"
            variant={kind === 'cancel' ? 'danger' : 'primary'}
            busy={operate.isPending}
          >
            {kind === 'cancel' ? 'Cancel the contact' : 'Put it in force'}
          </Button>
        </div>
      </form>
    </Dialog>
  );
}
