import { ErrorNote } from '../../../components/states.tsx';
import { ApiError } from '../../../lib/api-error.ts';
import { RefusedSets } from './refused-sets.tsx';

/** A file that cannot be used at all: every fault with its line, as the server found it. */
export function UnusableFile({
  error,
  fileLines,
}: {
  error: unknown;
  fileLines: readonly string[] | null;
}) {
  const faults = error instanceof ApiError ? error.fieldErrors : [];
  const refused = faults.flatMap((fault) => {
    const line = Number(/^\/file\/lines\/(\d+)$/.exec(fault.pointer)?.[1]);
    if (!Number.isFinite(line)) return [];
    const { column } = fault;
    return [
      {
        line,
        column: typeof column === 'number' ? column : 1,
        code: fault.code ?? '',
        reason: fault.detail,
      },
    ];
  });
  return (
    <>
      <ErrorNote error={error} />
      {refused.length > 0 && <RefusedSets refused={refused} fileLines={fileLines} noun="fault" />}
    </>
  );
}
