import { useQueryClient } from '@tanstack/react-query';
import { Button } from '../../../components/button.tsx';
import { Dialog } from '../../../components/dialog.tsx';
import { ErrorNote } from '../../../components/states.tsx';
import { ApiError, isStale } from '../../../lib/api-error.ts';
import { refreshPlans } from '../../../queries/plan-queries.ts';
import { ViolationList } from './violation-list.tsx';

/** Why an edit was not made: the rules it breaks, or that somebody was faster. */
export function EditFailure({ error, onClose }: { error: Error | null; onClose: () => void }) {
  const client = useQueryClient();
  const violations = error instanceof ApiError ? error.violations : [];
  const stale = isStale(error);
  const title = stale
    ? 'Somebody changed the plan'
    : violations.length > 0
      ? 'The plan’s rules do not allow it'
      : 'The edit was not made';
  return (
    <Dialog
      open={error !== null}
      onClose={onClose}
      title={title}
      footer={
        <>
          {stale && (
            <Button
              variant="primary"
              onClick={() => {
                void refreshPlans(client);
                onClose();
              }}
            >
              Show the plan as it is now
            </Button>
          )}
          {!stale && <Button onClick={onClose}>Leave the plan as it is</Button>}
        </>
      }
    >
      {stale ? (
        <p className="text-body">
          Your edit was made on an older state of the plan, so nothing was changed. Look at the plan
          as it is now, then decide again.
        </p>
      ) : violations.length > 0 ? (
        <ViolationList violations={violations} />
      ) : (
        <ErrorNote error={error} />
      )}
    </Dialog>
  );
}
