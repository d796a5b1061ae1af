import { useState } from 'react';
import { useNavigate } from 'react-router-dom';
import { useAnnounce } from '../../../../components/announcer.tsx';
import { Button } from '../../../../components/button.tsx';
import { Dialog } from '../../../../components/dialog.tsx';
import { TextAreaField } from '../../../../components/field.tsx';
import { Facts } from '../../../../components/facts.tsx';
import { ReasonDialog } from '../../../../components/reason-dialog.tsx';
import { dateClock, shortDay } from '../../../../lib/format-time.ts';
import {
  useReleasePlan,
  useRevisePlan,
  useSubmitPlan,
  useWithdrawPlan,
} from '../../../../queries/plan-queries.ts';
import { usePlanDesk } from '../../hooks/plan-desk.ts';
import { Refusal } from './refusal.tsx';

interface Props {
  onClose: () => void;
}

export function SubmitDialog({ onClose }: Props) {
  const { plan } = usePlanDesk();
  const submit = useSubmitPlan();
  const announce = useAnnounce();
  const { score } = plan;
  const send = (): void =>
    submit.mutate(plan, {
      onSuccess: (after) => {
        announce(
          after.state === 'approved'
            ? 'The plan is approved: nobody has to sign.'
            : 'The plan is in review.',
        );
        onClose();
      },
    });
  return (
    <Dialog
      open
      onClose={onClose}
      title={`Submit ${shortDay(plan.day)}, revision ${plan.revision}`}
      description="Every rule is judged again. Then the missions’ leads are asked to sign."
      footer={
        <>
          <Button onClick={onClose}>Keep it a draft</Button>
          <Button variant="primary" busy={submit.isPending} onClick={send}>
            Submit for sign-off
          </Button>
        </>
      }
    >
      <Facts
        rows={[
          ['Contacts of passes', `${score.contacts} of ${score.passes}`],
          ['Requirements met', String(score.requirementsMet)],
          ['Requirements short', String(score.requirementsShort)],
          ['Warnings', String(plan.warnings.length)],
          ['Signatures due', `${dateClock(Date.parse(plan.cutOffUtc))} UTC`],
        ]}
      />
      <Refusal error={submit.error} />
    </Dialog>
  );
}

export function WithdrawDialog({ onClose }: Props) {
  const { plan } = usePlanDesk();
  const withdraw = useWithdrawPlan();
  const announce = useAnnounce();
  const needsReason = plan.state === 'approved';
  return (
    <ReasonDialog
      open
      onClose={onClose}
      title="Withdraw the plan to draft"
      description={
        needsReason
          ? 'The leads have approved it; they are told why it comes back.'
          : 'The round of sign-off ends. Signatures stand again where nothing of that mission changes.'
      }
      label="Why"
      action="Withdraw plan"
      least={needsReason ? 3 : 0}
      busy={withdraw.isPending}
      error={withdraw.error}
      onSubmit={(reason) =>
        withdraw.mutate(
          { plan, reason },
          {
            onSuccess: () => {
              announce('The plan is a draft again.');
              onClose();
            },
          },
        )
      }
    />
  );
}

export function ReleaseDialog({ onClose }: Props) {
  const { plan } = usePlanDesk();
  const release = useReleasePlan();
  const announce = useAnnounce();
  const missing = plan.signOffs.filter(({ state }) => state === 'pending');
  const [reason, setReason] = useState('');
  const send = (): void =>
    release.mutate(
      {
        plan,
        body: missing.length > 0 ? { reasonForMissingSignatures: reason.trim() } : {},
      },
      {
        onSuccess: () => {
          announce('The plan is released.');
          onClose();
        },
      },
    );
  return (
    <Dialog
      open
      onClose={onClose}
      title={`Release ${shortDay(plan.day)}, revision ${plan.revision}`}
      description="Every rule is judged again. The crew, the missions and the exports then go by this plan."
      footer={
        <>
          <Button onClick={onClose}>Not yet</Button>
          <Button
            variant="primary"
            icon="release"
            busy={release.isPending}
            disabled={missing.length > 0 && reason.trim().length < 3}
            onClick={send}
          >
            Release plan
          </Button>
        </>
      }
    >
      {missing.length === 0 ? (
        <p className="text-body">Every mission that must sign has signed.</p>
      ) : (
        <>
          <p className="text-body">
            Not signed: {missing.map(({ missionName }) => missionName).join(', ')}. From the cut-off
            at {dateClock(Date.parse(plan.cutOffUtc))} UTC on it may be released without them, with
            a reason that the plan shows.
          </p>
          <TextAreaField
            label="Why without these signatures"
            className="mt-3"
            value={reason}
            onChange={(event) => setReason(event.target.value)}
          />
        </>
      )}
      <Refusal error={release.error} />
    </Dialog>
  );
}

export function ReviseDialog({ onClose }: Props) {
  const { plan } = usePlanDesk();
  const revise = useRevisePlan();
  const navigate = useNavigate();
  const send = (): void =>
    revise.mutate(plan, {
      onSuccess: (next) => {
        onClose();
        void navigate(`/plans/${next.id}`);
      },
    });
  return (
    <Dialog
      open
      onClose={onClose}
      title={`Begin revision ${plan.revision + 1} of ${shortDay(plan.day)}`}
      description="It starts as a copy. The released plan stays in force until the new revision is released."
      footer={
        <>
          <Button onClick={onClose}>Stay with this one</Button>
          <Button variant="primary" busy={revise.isPending} onClick={send}>
            Begin the revision
          </Button>
        </>
      }
    >
      <p className="text-body">
        Contacts that have begun, or begin within the freeze time, stay as they are.
      </p>
      <Refusal error={revise.error} />
    </Dialog>
  );
}
