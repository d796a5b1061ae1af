import { useQuery } from '@tanstack/react-query';
import { useMemo } from 'react';
import type { ElementSetUpload } from '../../../../shared/schemas/element-set.ts';
import { useMissions } from '../../../hooks/use-missions.ts';
import { useNow } from '../../../hooks/use-now.ts';
import { useStation } from '../../../hooks/use-station.ts';
import { elementSetQueries } from '../../../queries/element-set-queries.ts';
import { satelliteQueries } from '../../../queries/satellite-queries.ts';
import { dayStart, DAY_MS, HOUR_MS } from '../../../../shared/time.ts';
import { movedSets, type MovedSet } from '../moved-sets.ts';
import { MovedTable } from './moved-table.tsx';
import { ReadSets } from './read-sets.tsx';
import { RefusedSets } from './refused-sets.tsx';
import { UploadCount } from './upload-counts.tsx';

interface Props {
  upload: ElementSetUpload;
  /** Lines of the file, while it is at hand; compared with the sets in use. */
  fileLines: readonly string[] | null;
}

const names = (list: readonly string[], nothing: string): string =>
  list.length === 0
    ? nothing
    : list.length <= 3
      ? list.join(', ')
      : `${list.slice(0, 2).join(', ')} and ${list.length - 2} more`;

export function UploadReport({ upload, fileLines }: Props) {
  const satellites = useQuery(satelliteQueries.list());
  const guardSeconds = useStation().station?.guardTimeSeconds ?? 5;
  const { moved, atMs } = useMoved(upload, fileLines);
  const nameOf = (id: string | null): string | null =>
    satellites.data?.find((satellite) => satellite.id === id)?.name ?? null;
  const beyond = moved.filter((set) => Math.abs(set.lateSeconds ?? 0) > guardSeconds);
  const missions = useMissions();
  const fresh = upload.accepted.filter(({ unchanged }) => !unchanged);
  return (
    <>
      <div className="grid rounded-panel border border-line bg-surface narrow:grid-cols-4">
        <UploadCount
          icon="approve"
          tone="text-ok-mark"
          count={upload.accepted.length}
          word="accepted"
        >
          {upload.accepted.length - fresh.length} unchanged
        </UploadCount>
        <UploadCount
          icon="needsAttention"
          tone={upload.refused.length > 0 ? 'text-danger-mark' : 'text-ink-faint'}
          count={upload.refused.length}
          word="refused"
        >
          {upload.refused.length > 0
            ? 'each with its line and its remedy'
            : 'every set was readable'}
        </UploadCount>
        <UploadCount
          icon="hash"
          tone={upload.unknown.length > 0 ? 'text-warn-mark' : 'text-ink-faint'}
          count={upload.unknown.length}
          word="not in the fleet"
        >
          {names(
            upload.unknown.map(({ catalogNumber }) => String(catalogNumber)),
            'every satellite is known',
          )}
        </UploadCount>
        <UploadCount
          icon="drifted"
          tone={beyond.length > 0 ? 'text-warn-mark' : 'text-ink-faint'}
          count={beyond.length}
          word={`moved more than ${guardSeconds} s`}
        >
          {fileLines
            ? names(
                beyond.map((set) => set.name),
                'none beyond the guard time',
              )
            : 'known while the file is at hand'}
        </UploadCount>
      </div>
      {upload.refused.length > 0 && <RefusedSets refused={upload.refused} fileLines={fileLines} />}
      {moved.length > 0 && missions.list.length > 0 && (
        <MovedTable sets={moved} guardSeconds={guardSeconds} atMs={atMs} />
      )}
      <ReadSets upload={upload} satelliteName={nameOf} />
    </>
  );
}

function useMoved(
  upload: ElementSetUpload,
  fileLines: readonly string[] | null,
): { moved: MovedSet[]; atMs: number } {
  const inUse = useQuery(elementSetQueries.list({ state: 'in-use' }));
  const atMs = dayStart(useNow(HOUR_MS)) + DAY_MS + DAY_MS / 2;
  const moved = useMemo(
    () =>
      fileLines && inUse.data && upload.id === null
        ? movedSets(upload, { fileLines, inUse: inUse.data, atMs })
        : [],
    [upload, fileLines, inUse.data, atMs],
  );
  return { moved, atMs };
}
