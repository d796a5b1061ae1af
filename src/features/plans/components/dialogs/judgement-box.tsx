import { Spinner } from '../../../../components/button.tsx';
import { ToneWord } from '../../../../components/chip.tsx';
import { ErrorNote } from '../../../../components/states.tsx';
import type { Judgement } from '../../hooks/use-judgement.ts';
import { ViolationList } from '../violation-list.tsx';

/** Whether the rules of the plan hold with this edit, as the server judges it. */
export function JudgementBox({ judgement }: { judgement: Judgement }) {
  if (judgement.state === 'idle') return null;
  return (
    <div role="status" className="mt-4 rounded-control border border-line bg-raised px-3 py-2.5">
      {judgement.state === 'judging' && (
        <p className="flex items-center gap-2 text-ink-muted">
          <Spinner /> The rules are being judged
        </p>
      )}
      {judgement.state === 'holds' && (
        <ToneWord tone="ok" icon="approve">
          Every rule holds
        </ToneWord>
      )}
      {judgement.state === 'broken' && <ViolationList violations={judgement.violations} />}
      {judgement.state === 'failed' && <ErrorNote error={judgement.error} />}
    </div>
  );
}
