import { useState } from 'react';
import { useNavigate } from 'react-router-dom';
import type { OperationalChange } from '../../../../../shared/schemas/edit.ts';
import type { Contact } from '../../../../../shared/schemas/plan.ts';
import { toIso } from '../../../../../shared/time.ts';
import { useAnnounce } from '../../../../components/announcer.tsx';
import { Button } from '../../../../components/button.tsx';
import { Dialog } from '../../../../components/dialog.tsx';
import { SelectField, TextAreaField, TextField } from '../../../../components/field.tsx';
import { Segmented } from '../../../../components/segmented.tsx';
import { ErrorNote } from '../../../../components/states.tsx';
import { ApiError } from '../../../../lib/api-error.ts';
import { useOperatePlan } from '../../../../queries/plan-queries.ts';
import { usePlanDesk } from '../../hooks/plan-desk.ts';
import { legInterval } from '../../model/plan-legs.ts';
import { ViolationList } from '../violation-list.tsx';
import { draftOf, intervalOf } from './leg-fields.tsx';

type Kind = 'move-leg' | 'shorten' | 'cancel';

/** Repair of the running day: a new revision, released at once, with reason and caller. */
export function OperateDialog({ contact, onClose }: { contact: Contact; onClose: () => void }) {
  const { plan, columns } = usePlanDesk();
  const operate = useOperatePlan();
  const announce = useAnnounce();
  const navigate = useNavigate();
  const [kind, setKind] = useState<Kind>('move-leg');
  const [direction, setDirection] = useState<'receive' | 'transmit'>('receive');
  const [channelId, setChannelId] = useState('');
  const before = legInterval(contact.receive);
  const [times, setTimes] = useState(() => draftOf('', before));
  const [reason, setReason] = useState('');
  const [caller, setCaller] = useState('');
  const change = changeOf({
    kind,
    contact,
    direction,
    channelId,
    interval: intervalOf(times, before),
    reason: reason.trim(),
    caller: caller.trim(),
  });
  const others = [...columns.values()].filter(
    ({ channel, face, id }) =>
      channel.direction === direction &&
      face.id === contact.faceId &&
      id !== contact[direction]?.channelId,
  );
  const send = (): void => {
    if (!change) return;
    operate.mutate(
      { plan, change },
      {
        onSuccess: (after) => {
          announce(`Revision ${after.revision} is released.`);
          onClose();
          void navigate(`/plans/${after.id}`);
        },
      },
    );
  };
  return (
    <Dialog
      open
      onClose={onClose}
      title={`Change ${contact.satelliteName} on the running day`}
      description="Released at once as a new revision; missions whose times or services change are told."
      footer={
        <>
          <Button onClick={onClose}>Leave it</Button>
          <Button variant="primary" busy={operate.isPending} disabled={!change} onClick={send}>
            Release the change
          </Button>
        </>
      }
    >
      <div className="flex flex-col gap-3.5">
        <Segmented
          label="What to do"
          value={kind}
          onChange={setKind}
          options={[
            { value: 'move-leg', label: 'Move a leg' },
            { value: 'shorten', label: 'Shorten' },
            { value: 'cancel', label: 'Cancel' },
          ]}
        />
        {kind === 'move-leg' && (
          <div className="grid grid-cols-2 gap-3">
            <SelectField
              label="Leg"
              value={direction}
              onChange={(event) =>
                setDirection(event.target.value === 'transmit' ? 'transmit' : 'receive')
              }
            >
              <option value="receive">Receive leg</option>
              {contact.transmit && <option value="transmit">Uplink</option>}
            </SelectField>
            <SelectField
              label="To channel"
              value={channelId}
              onChange={(event) => setChannelId(event.target.value)}
            >
              <option value="">Choose a channel</option>
              {others.map(({ id, channel }) => (
                <option key={id} value={id}>
                  {channel.label}
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
              value={times.from}
              onChange={(event) => setTimes({ ...times, from: event.target.value })}
            />
            <TextField
              label="To"
              unit="UTC"
              value={times.to}
              onChange={(event) => setTimes({ ...times, to: event.target.value })}
            />
          </div>
        )}
        <TextAreaField
          label="Reason"
          rows={2}
          value={reason}
          onChange={(event) => setReason(event.target.value)}
        />
        <TextField
          label="Who called"
          value={caller}
          maxLength={80}
          onChange={(event) => setCaller(event.target.value)}
        />
        <ErrorNote error={operate.error} />
        {operate.error instanceof ApiError && operate.error.violations.length > 0 && (
          <ViolationList violations={operate.error.violations} />
        )}
      </div>
    </Dialog>
  );
}

interface Draft {
  kind: Kind;
  contact: Contact;
  direction: 'receive' | 'transmit';
  channelId: string;
  interval: { fromMs: number; toMs: number } | null;
  reason: string;
  caller: string;
}

function changeOf({
  kind,
  contact,
  direction,
  channelId,
  interval,
  reason,
  caller,
}: Draft): OperationalChange | null {
  if (reason.length < 3) return null;
  const common = { contactId: contact.id, reason, caller };
  switch (kind) {
    case 'move-leg':
      return channelId === '' ? null : { kind, ...common, direction, channelId };
    case 'shorten':
      return (
        interval && {
          kind,
          ...common,
          fromUtc: toIso(interval.fromMs),
          toUtc: toIso(interval.toMs),
        }
      );
    case 'cancel':
      return { kind, ...common };
  }
}
