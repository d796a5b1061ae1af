import { ErrorNote } from '../../../../components/states.tsx';
import { ApiError } from '../../../../lib/api-error.ts';
import { ViolationList } from '../violation-list.tsx';

/** What stands in the way: broken rules by name, or the words of the server. */
export function Refusal({ error }: { error: Error | null }) {
  if (!error) return null;
  const violations = error instanceof ApiError ? error.violations : [];
  return (
    <div className="mt-3 flex flex-col gap-2">
      <ErrorNote error={error} />
      {violations.length > 0 && (
        <div
          className="max-h-60 overflow-y-auto rounded-control border border-line px-3 py-2"
          tabIndex={0}
          role="region"
          aria-label="Broken rules"
        >
          <ViolationList violations={violations} />
        </div>
      )}
    </div>
  );
}
