import { useInfiniteQuery } from '@tanstack/react-query';
import { z } from 'zod';
import { Button } from '../../components/button.tsx';
import { FilterSelect } from '../../components/filter-fields.tsx';
import { PageBody, PageHead } from '../../components/page-head.tsx';
import { Panel } from '../../components/panel.tsx';
import { EmptyState, ErrorState, Skeleton } from '../../components/states.tsx';
import { AuditTable } from '../../features/audit/components/audit-table.tsx';
import { useTitle } from '../../hooks/use-title.ts';
import { useUrlState } from '../../hooks/use-url-state.ts';
import { auditQueries } from '../../queries/audit-queries.ts';

const SHAPE = {
  about: z.string().max(40).optional(),
  action: z.string().max(60).optional(),
  id: z.string().max(60).optional(),
};
const ABOUT = [
  ['plan', 'Plans'],
  ['contact', 'Contacts'],
  ['element-set-upload', 'Uploads'],
  ['element-set', 'Element sets'],
  ['satellite', 'Satellites'],
  ['mission', 'Missions'],
  ['requirement', 'Requirement lines'],
  ['request', 'Requests'],
  ['closure', 'Closures'],
  ['station', 'Stations'],
  ['face', 'Faces'],
  ['channel', 'Channels'],
  ['user', 'People'],
  ['session', 'Sessions'],
] as const;

export function Component() {
  useTitle('Audit');
  const [url, setUrl] = useUrlState(SHAPE);
  const events = useInfiniteQuery(
    auditQueries.events({ entity: url.about, action: url.action, entityId: url.id }),
  );
  const rows = events.data?.pages.flatMap((page) => page.items) ?? [];
  return (
    <>
      <PageHead title="Audit" aside="Who did what, newest first; nothing here is ever changed" />
      <PageBody>
        <Panel
          title="Events"
          flush
          actions={
            <>
              {(url.action ?? url.id) && (
                <Button size="small" icon="close" onClick={() => setUrl({ action: '', id: '' })}>
                  {url.action ?? 'One subject'}
                </Button>
              )}
              <FilterSelect
                label="About"
                value={url.about ?? ''}
                onChange={(about) => setUrl({ about })}
                options={ABOUT}
              />
            </>
          }
        >
          {events.isError ? (
            <ErrorState
              error={events.error}
              what="The audit trail"
              onRetry={() => void events.refetch()}
            />
          ) : events.isPending ? (
            <Skeleton />
          ) : rows.length === 0 ? (
            <EmptyState icon="search" title="No event fits these filters" />
          ) : (
            <>
              <AuditTable events={rows} onFilter={setUrl} />
              {events.hasNextPage && (
                <div className="flex justify-center py-3">
                  <Button
                    busy={events.isFetchingNextPage}
                    onClick={() => void events.fetchNextPage()}
                  >
                    Show older events
                  </Button>
                </div>
              )}
            </>
          )}
        </Panel>
      </PageBody>
    </>
  );
}
