import { useState } from 'react';
import { Link } from 'react-router-dom';
import type { ElementSet } from '../../../../shared/schemas/element-set.ts';
import { useAnnounce } from '../../../components/announcer.tsx';
import { Button, IconButton } from '../../../components/button.tsx';
import { Facts } from '../../../components/facts.tsx';
import { ReasonDialog } from '../../../components/reason-dialog.tsx';
import { ElementStateChip } from '../../../components/state-chips.tsx';
import { useMay } from '../../../hooks/use-session.ts';
import { ageWords, dateClock, dateClockSeconds } from '../../../lib/format-time.ts';
import { useWithdrawElementSet } from '../../../queries/element-set-queries.ts';

export function ElementSetDetail({ set, onClose }: { set: ElementSet; onClose: () => void }) {
  const { may } = useMay();
  const [asking, setAsking] = useState(false);
  const withdraw = useWithdrawElementSet();
  const announce = useAnnounce();
  const mayWithdraw =
    set.state !== 'withdrawn' && may('withdraw.element-sets', { missionId: set.missionId });
  return (
    <div className="p-4.5">
      <div className="flex items-center gap-2.5">
        <h2 className="text-section font-semibold">{set.satelliteName ?? set.catalogNumber}</h2>
        <ElementStateChip state={set.state} />
        <IconButton icon="close" label="Close the details" className="ml-auto" onClick={onClose} />
      </div>
      <Facts
        className="mt-3"
        rows={[
          ['Epoch', `${dateClockSeconds(Date.parse(set.epochUtc))} UTC`],
          ['Age', ageWords(Math.max(0, set.ageHours))],
          [
            'Used from',
            set.useFromUtc ? `${dateClock(Date.parse(set.useFromUtc))} UTC` : 'at once',
          ],
          ['Uploaded', `${dateClock(Date.parse(set.uploadedUtc))} UTC by ${set.uploadedBy}`],
        ]}
      />
      <h3 className="mt-4 mb-1 font-semibold">The two lines</h3>
      <pre
        tabIndex={0}
        aria-label="The two lines"
        className="overflow-x-auto rounded-mark bg-raised px-2.5 py-2 font-mono text-caption"
      >
        {set.line1}
        {'\n'}
        {set.line2}
      </pre>
      <p className="mt-3 flex flex-wrap gap-x-4 gap-y-1">
        {set.satelliteId && (
          <Link className="link" to={`/element-sets?state=all&satellite=${set.satelliteId}`}>
            Every set of this satellite
          </Link>
        )}
        <Link className="link" to={`/element-sets/upload?upload=${set.uploadId}`}>
          The file it came in
        </Link>
      </p>
      {mayWithdraw && (
        <Button className="mt-4" icon="returned" onClick={() => setAsking(true)}>
          Withdraw this set
        </Button>
      )}
      <ReasonDialog
        open={asking}
        onClose={() => setAsking(false)}
        title={`Withdraw the set of ${set.satelliteName ?? set.catalogNumber}`}
        description="The set before it is in use again; passes and plans follow."
        label="Why"
        action="Withdraw the set"
        busy={withdraw.isPending}
        error={withdraw.error}
        onSubmit={(reason) =>
          withdraw.mutate(
            { id: set.id, reason },
            {
              onSuccess: () => {
                announce('The set is withdrawn.');
                setAsking(false);
              },
            },
          )
        }
      />
    </div>
  );
}
