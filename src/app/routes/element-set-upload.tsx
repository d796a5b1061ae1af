import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { z } from 'zod';
import { useAnnounce } from '../../components/announcer.tsx';
import { Button, ButtonLink } from '../../components/button.tsx';
import { PageBody, PageHead } from '../../components/page-head.tsx';
import { QueryView } from '../../components/query-view.tsx';
import { RunProgress } from '../../components/run-progress.tsx';
import { Forbidden } from '../../components/states.tsx';
import { DropZone } from '../../features/element-sets/components/drop-zone.tsx';
import { UnusableFile } from '../../features/element-sets/components/unusable-file.tsx';
import { UploadReport } from '../../features/element-sets/components/upload-report.tsx';
import { UploadSide } from '../../features/element-sets/components/upload-side.tsx';
import { useMay } from '../../hooks/use-session.ts';
import { useTitle } from '../../hooks/use-title.ts';
import { useUrlState } from '../../hooks/use-url-state.ts';
import { bytes, counted } from '../../lib/format-number.ts';
import { dateClock } from '../../lib/format-time.ts';
import {
  elementSetQueries,
  useAcceptElementFile,
  usePreviewElementFile,
} from '../../queries/element-set-queries.ts';
import { paths } from '../paths.ts';

const SHAPE = { upload: z.uuid().optional() };

export function Component() {
  const { mayEver } = useMay();
  const [{ upload }] = useUrlState(SHAPE);
  useTitle('Upload element sets');
  if (!mayEver('upload.element-sets'))
    return (
      <>
        <PageHead title="Upload element sets" />
        <Forbidden what="Uploading element sets" who="Operators, schedulers and mission leads" />
      </>
    );
  return upload ? <PastUpload id={upload} /> : <NewUpload />;
}

interface Chosen {
  file: File;
  lines: string[];
}

function NewUpload() {
  const [chosen, setChosen] = useState<Chosen | null>(null);
  const [, setUrl] = useUrlState(SHAPE);
  const preview = usePreviewElementFile();
  const accept = useAcceptElementFile();
  const announce = useAnnounce();
  const choose = (file: File): void => {
    void file.text().then((text) => setChosen({ file, lines: text.split(/\r\n|\n|\r/) }));
    accept.reset();
    preview.mutate(file);
  };
  const discard = (): void => {
    setChosen(null);
    preview.reset();
    accept.reset();
  };
  const fresh = preview.data?.accepted.filter(({ unchanged }) => !unchanged).length ?? 0;
  const unknown = preview.data?.unknown.length ?? 0;
  const take = (): void => {
    if (!chosen) return;
    accept.mutate(chosen.file, {
      onSuccess: (done) => {
        announce(`${counted(done.accepted.length, 'element set')} accepted.`);
        if (done.id) setUrl({ upload: done.id }, { push: true });
      },
    });
  };
  const error = accept.error ?? preview.error;
  return (
    <>
      <PageHead
        title={preview.data ? 'Check this file before it counts' : 'Upload element sets'}
        aside={
          chosen ? (
            <>
              <strong className="font-semibold text-ink">{chosen.file.name}</strong>{' '}
              {bytes(chosen.file.size)} bytes, {chosen.lines.length} lines
            </>
          ) : (
            'A file is read and shown first; it counts once you accept it.'
          )
        }
        actions={
          preview.data ? (
            <>
              <span className="hidden text-right text-caption text-ink-muted drawer:inline">
                Nothing is changed until you accept.
                <br />
                Refused sets stay out; the old ones remain in use.
              </span>
              <Button onClick={discard}>Discard</Button>
              <Button
                variant="primary"
                icon="check"
                busy={accept.isPending}
                disabled={fresh + unknown === 0}
                onClick={take}
              >
                Accept {counted(fresh + unknown, 'element set')}
              </Button>
            </>
          ) : (
            <ButtonLink to={paths.elementSets}>All element sets</ButtonLink>
          )
        }
      />
      <div className="flex flex-1 flex-col drawer:flex-row">
        <PageBody className="min-w-0">
          {error && <UnusableFile error={error} fileLines={chosen?.lines ?? null} />}
          {preview.data ? (
            <UploadReport upload={preview.data} fileLines={chosen?.lines ?? null} />
          ) : (
            <DropZone onFile={choose} busy={preview.isPending} />
          )}
        </PageBody>
        {preview.data && (
          <aside
            aria-label="What accepting does"
            className="border-line bg-surface drawer:w-92 drawer:border-l"
          >
            <UploadSide upload={preview.data} />
          </aside>
        )}
      </div>
    </>
  );
}

function PastUpload({ id }: { id: string }) {
  const upload = useQuery(elementSetQueries.upload(id));
  return (
    <>
      <PageHead
        title={upload.data?.fileName ?? 'Upload'}
        aside={
          upload.data &&
          `${bytes(upload.data.sizeBytes)} bytes, uploaded ${dateClock(Date.parse(upload.data.uploadedUtc))} UTC by ${upload.data.uploadedBy}`
        }
        actions={
          <>
            <ButtonLink to={paths.elementSets}>All element sets</ButtonLink>
            <ButtonLink to={paths.elementSetUpload} variant="primary" icon="upload">
              Upload another file
            </ButtonLink>
          </>
        }
      />
      <PageBody>
        <QueryView query={upload} what="This upload" who="Operators, schedulers and mission leads">
          {(data) => (
            <>
              {data.runId && (
                <div className="rounded-panel border border-line bg-surface px-4 py-3">
                  <RunProgress runId={data.runId} />
                </div>
              )}
              <UploadReport upload={data} fileLines={null} />
            </>
          )}
        </QueryView>
      </PageBody>
    </>
  );
}
