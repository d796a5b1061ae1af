import { useQuery } from '@tanstack/react-query';
import { z } from 'zod';
import { ElementSet } from '../../../shared/schemas/element-set.ts';
import { ButtonLink } from '../../components/button.tsx';
import { PageBody, PageHead } from '../../components/page-head.tsx';
import { Panel } from '../../components/panel.tsx';
import { QueryView } from '../../components/query-view.tsx';
import { Segmented } from '../../components/segmented.tsx';
import { EmptyState } from '../../components/states.tsx';
import { ElementSetDetail } from '../../features/element-sets/components/element-set-detail.tsx';
import { ElementSetTable } from '../../features/element-sets/components/element-set-table.tsx';
import { RecentUploads } from '../../features/element-sets/components/recent-uploads.tsx';
import { useMay } from '../../hooks/use-session.ts';
import { useTitle } from '../../hooks/use-title.ts';
import { useUrlState } from '../../hooks/use-url-state.ts';
import { counted } from '../../lib/format-number.ts';
import { ageWords } from '../../lib/format-time.ts';
import { elementSetQueries } from '../../queries/element-set-queries.ts';
import { paths } from '../paths.ts';

const STATES = ['in-use', 'candidate', 'former', 'withdrawn', 'unassigned', 'all'] as const;
const SHAPE = {
  state: z.enum(STATES).default('in-use'),
  satellite: z.uuid().optional(),
  set: z.uuid().optional(),
};
const WORDS: Record<(typeof STATES)[number], string> = {
  'in-use': 'In use',
  candidate: 'Waiting',
  former: 'Former',
  withdrawn: 'Withdrawn',
  unassigned: 'Unassigned',
  all: 'All',
};

const oldest = (sets: readonly ElementSet[]): string => {
  const hours = Math.max(...sets.map(({ ageHours }) => ageHours));
  return sets.length === 0 ? '' : `, the oldest ${ageWords(hours)} old`;
};

export function Component() {
  useTitle('Element sets');
  const { mayEver } = useMay();
  const [url, setUrl] = useUrlState(SHAPE);
  const sets = useQuery(
    elementSetQueries.list({
      satelliteId: url.satellite,
      state: url.state === 'all' ? undefined : url.state,
    }),
  );
  const chosen = sets.data?.find(({ id }) => id === url.set) ?? null;
  const upload = mayEver('upload.element-sets') && (
    <ButtonLink to={paths.elementSetUpload} variant="primary" icon="upload">
      Upload a file
    </ButtonLink>
  );
  return (
    <>
      <PageHead
        title="Element sets"
        aside={sets.data && `${counted(sets.data.length, 'set')}${oldest(sets.data)}`}
        actions={upload}
      />
      <div className="flex flex-1 flex-col drawer:flex-row">
        <PageBody className="min-w-0">
          <Panel
            title={url.state === 'in-use' ? 'In use now' : WORDS[url.state]}
            flush
            actions={
              <Segmented
                label="State of the sets"
                size="small"
                value={url.state}
                onChange={(state) =>
                  setUrl({ state: state === 'in-use' ? null : state, set: null })
                }
                options={STATES.map((value) => ({ value, label: WORDS[value] }))}
              />
            }
          >
            <QueryView
              query={sets}
              what="The element sets"
              isEmpty={(data) => data.length === 0}
              empty={
                <EmptyState
                  title={
                    url.state === 'in-use' ? 'No satellite has an element set yet' : 'No such set'
                  }
                  action={url.state === 'in-use' && upload}
                >
                  {url.state === 'in-use'
                    ? 'Passes are predicted from element sets: upload a file of them.'
                    : `No element set is ${WORDS[url.state].toLowerCase()}.`}
                </EmptyState>
              }
            >
              {(data) => (
                <ElementSetTable
                  sets={data}
                  withState={url.state === 'all'}
                  chosenId={url.set ?? null}
                  onChoose={(set) => setUrl({ set })}
                />
              )}
            </QueryView>
          </Panel>
          {mayEver('upload.element-sets') && <RecentUploads />}
        </PageBody>
        {chosen && (
          <aside
            aria-label={`Element set of ${chosen.satelliteName ?? chosen.catalogNumber}`}
            className="border-line bg-surface drawer:sticky drawer:top-13 drawer:max-h-[calc(100dvh-3.25rem)] drawer:w-92 drawer:self-start drawer:overflow-y-auto drawer:border-l"
          >
            <ElementSetDetail set={chosen} onClose={() => setUrl({ set: null })} />
          </aside>
        )}
      </div>
    </>
  );
}
