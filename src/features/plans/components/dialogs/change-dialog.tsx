import { useState } from 'react';
import type { Edit } from '../../../../../shared/schemas/edit.ts';
import type { Contact } from '../../../../../shared/schemas/plan.ts';
import { toIso, type Interval } from '../../../../../shared/time.ts';
import { Button } from '../../../../components/button.tsx';
import { Dialog } from '../../../../components/dialog.tsx';
import { usePlanDesk } from '../../hooks/plan-desk.ts';
import { usePlanEdits } from '../../hooks/plan-edits.ts';
import { useJudgement } from '../../hooks/use-judgement.ts';
import { legInterval } from '../../model/plan-legs.ts';
import { JudgementBox } from './judgement-box.tsx';
import { LegFields, draftOf, intervalOf, type LegDraft } from './leg-fields.tsx';
import { windowOf } from './pass-window.ts';
import { SwapOffer } from './swap-offer.tsx';

interface Props {
  contact: Contact;
  focus: 'channel' | 'times';
  onClose: () => void;
}

/** Moves and trims a contact by fields; the rules are judged while it is typed. */
export function ChangeDialog({ contact, focus, onClose }: Props) {
  const { plan, passes, labelOf } = usePlanDesk();
  const { apply, isBusy } = usePlanEdits();
  // The version on which the change is thought out: if somebody is faster, it is refused as stale.
  const [version] = useState(plan.version);
  const before = {
    receive: legInterval(contact.receive),
    transmit: contact.transmit && legInterval(contact.transmit),
  };
  const [receive, setReceive] = useState(() => draftOf(contact.receive.channelId, before.receive));
  const [transmit, setTransmit] = useState<LegDraft>(() =>
    contact.transmit && before.transmit
      ? draftOf(contact.transmit.channelId, before.transmit)
      : { ...draftOf('', before.receive), channelId: '' },
  );
  const pass = passes.get(contact.passId);
  const near = before.transmit ?? before.receive;
  const edits = editsOf(contact, {
    receive,
    transmit,
    nearReceive: before.receive,
    nearTransmit: near,
  });
  const judgement = useJudgement(plan, edits);
  const save = (): void => {
    if (!edits) return;
    const moved = receive.channelId !== contact.receive.channelId;
    const words = moved
      ? `${contact.satelliteName} moved to ${labelOf(receive.channelId)}.`
      : `${contact.satelliteName} changed.`;
    apply(edits, words, { version, onDone: onClose });
  };
  return (
    <Dialog
      open
      onClose={onClose}
      title={`${focus === 'channel' ? 'Move' : 'Trim'} ${contact.satelliteName}`}
      description="Times in UTC, whole seconds."
      footer={
        <>
          <Button onClick={onClose}>Leave it</Button>
          <Button
            variant="primary"
            busy={isBusy}
            disabled={judgement.state !== 'holds'}
            onClick={save}
          >
            {focus === 'channel' ? 'Move contact' : 'Trim contact'}
          </Button>
        </>
      }
    >
      <div className="flex flex-col gap-4">
        <LegFields
          legend="Receive leg"
          direction="receive"
          faceId={contact.faceId}
          draft={receive}
          onChange={setReceive}
          window={windowOf(pass, contact.faceId, 'receive', before.receive)}
          near={before.receive}
          autoFocus={focus}
        />
        <LegFields
          legend="Uplink"
          direction="transmit"
          faceId={contact.faceId}
          draft={transmit}
          onChange={setTransmit}
          window={windowOf(pass, contact.faceId, 'transmit', near)}
          near={near}
          none="No uplink"
        />
      </div>
      {edits === null && judgement.state === 'idle' && (
        <p className="mt-4 text-ink-muted">
          Change a channel or a time; the rules are judged at once.
        </p>
      )}
      <JudgementBox judgement={judgement} />
      <SwapOffer
        contact={contact}
        wanted={receive.channelId}
        violations={judgement.violations}
        onDone={onClose}
      />
    </Dialog>
  );
}

interface Drafts {
  receive: LegDraft;
  transmit: LegDraft;
  nearReceive: Interval;
  nearTransmit: Interval;
}

/** The one edit that the fields mean; null while nothing is changed or a time is unreadable. */
function editsOf(contact: Contact, drafts: Drafts): Edit[] | null {
  const receive = intervalOf(drafts.receive, drafts.nearReceive);
  const wantsUplink = drafts.transmit.channelId !== '';
  const transmit = wantsUplink ? intervalOf(drafts.transmit, drafts.nearTransmit) : null;
  if (!receive || (wantsUplink && !transmit)) return null;
  const edit: Edit = {
    op: 'change',
    contactId: contact.id,
    ...changedLeg('receive', contact.receive, drafts.receive.channelId, receive),
    ...(transmit
      ? changedLeg('transmit', contact.transmit, drafts.transmit.channelId, transmit)
      : contact.transmit
        ? { transmit: null }
        : {}),
  };
  return Object.keys(edit).length > 2 ? [edit] : null;
}

function changedLeg(
  name: 'receive' | 'transmit',
  before: { channelId: string; fromUtc: string; toUtc: string } | null,
  channelId: string,
  interval: Interval,
): Partial<Record<'receive' | 'transmit', { channelId: string; fromUtc: string; toUtc: string }>> {
  const leg = { channelId, fromUtc: toIso(interval.fromMs), toUtc: toIso(interval.toMs) };
  const same =
    before !== null &&
    before.channelId === channelId &&
    Date.parse(before.fromUtc) === interval.fromMs &&
    Date.parse(before.toUtc) === interval.toMs;
  return same ? {} : { [name]: leg };
}
