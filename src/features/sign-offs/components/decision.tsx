import { useState } from 'react';
import type { Plan } from '../../../../shared/schemas/plan.ts';
import { useAnnounce } from '../../../components/announcer.tsx';
import { Button } from '../../../components/button.tsx';
import { ToneWord } from '../../../components/chip.tsx';
import { CheckField, TextAreaField } from '../../../components/field.tsx';
import { Panel } from '../../../components/panel.tsx';
import { ErrorNote } from '../../../components/states.tsx';
import { dateClock } from '../../../lib/format-time.ts';
import { useSignPlan } from '../../../queries/plan-queries.ts';

interface Props {
  plan: Plan;
  missionId: string;
  shortCount: number;
}

const ANSWER = {
  approved: 'Signed',
  unchanged: 'Signed, unchanged since',
  returned: 'Returned',
  pending: 'Not yet signed',
} as const;

/** The answer of the mission; accepting what is short is a decision of its own, a return needs a reason. */
export function Decision({ plan, missionId, shortCount }: Props) {
  const signOff = plan.signOffs.find((one) => one.missionId === missionId);
  const isMine = plan.signableMissionIds.includes(missionId);
  return (
    <Panel title="Sign-off" aside={`revision ${plan.revision} only`}>
      {signOff && !isMine && (
        <div className="flex flex-col gap-1.5 text-body">
          <ToneWord
            tone={
              signOff.state === 'returned' ? 'warn' : signOff.state === 'pending' ? 'info' : 'ok'
            }
            icon={
              signOff.state === 'returned'
                ? 'returned'
                : signOff.state === 'pending'
                  ? 'clock'
                  : 'approve'
            }
          >
            {ANSWER[signOff.state]}
            {signOff.byName && ` by ${signOff.byName}`}
          </ToneWord>
          {signOff.atUtc && (
            <span className="figures text-table text-ink-muted">
              {dateClock(Date.parse(signOff.atUtc))} UTC
            </span>
          )}
          {signOff.comment && <q className="text-table">{signOff.comment}</q>}
        </div>
      )}
      {isMine && <DecisionForm plan={plan} missionId={missionId} shortCount={shortCount} />}
    </Panel>
  );
}

function DecisionForm({ plan, missionId, shortCount }: Props) {
  const sign = useSignPlan();
  const announce = useAnnounce();
  const [comment, setComment] = useState('');
  const [accepts, setAccepts] = useState(false);
  const [tried, setTried] = useState<'approve' | 'return' | null>(null);
  const needsReason = tried === 'return' && comment.trim().length < 3;
  const mustAccept = shortCount > 0 && !accepts;
  const answer = (decision: 'approve' | 'return'): void => {
    setTried(decision);
    if (decision === 'approve' ? mustAccept : comment.trim().length < 3) return;
    sign.mutate(
      { plan, body: { missionId, decision, comment: comment.trim() } },
      {
        onSuccess: () =>
          announce(decision === 'approve' ? 'The plan is approved.' : 'The plan is returned.'),
      },
    );
  };
  return (
    <div className="flex flex-col gap-3">
      <TextAreaField
        label="Comment"
        hint="Sent with either answer. A return needs one."
        value={comment}
        onChange={(event) => setComment(event.target.value)}
        error={needsReason ? 'Say what has to change' : undefined}
      />
      {shortCount > 0 && (
        <>
          <CheckField
            label={
              shortCount === 1
                ? 'I accept the requirement that is short'
                : `I accept the ${shortCount} requirements that are short`
            }
            checked={accepts}
            onChange={(event) => setAccepts(event.target.checked)}
          />
          {tried === 'approve' && mustAccept && (
            <p role="alert" className="text-caption font-medium text-danger-text">
              Accept what is short, or return the plan with a reason.
            </p>
          )}
        </>
      )}
      <ErrorNote error={sign.error} />
      <div className="flex flex-wrap gap-2">
        <Button icon="returned" busy={sign.isPending} onClick={() => answer('return')}>
          Return with a reason
        </Button>
        <Button
          variant="primary"
          icon="approve"
          busy={sign.isPending}
          onClick={() => answer('approve')}
        >
          Approve plan
        </Button>
      </div>
    </div>
  );
}
