import { useInfiniteQuery } from '@tanstack/react-query';
import { z } from 'zod';
import { Button } from '../../components/button.tsx';
import { PageBody, PageHead } from '../../components/page-head.tsx';
import { Panel } from '../../components/panel.tsx';
import { EmptyState, ErrorState, Skeleton } from '../../components/states.tsx';
import { MailLetter, MailTable } from '../../features/mails/components/mail-table.tsx';
import { useTitle } from '../../hooks/use-title.ts';
import { useUrlState } from '../../hooks/use-url-state.ts';
import { auditQueries } from '../../queries/audit-queries.ts';

const SHAPE = { mail: z.uuid().optional() };

export function Component() {
  useTitle('Mail');
  const [url, setUrl] = useUrlState(SHAPE);
  const mails = useInfiniteQuery(auditQueries.mails());
  const rows = mails.data?.pages.flatMap((page) => page.items) ?? [];
  const chosen = rows.find(({ id }) => id === url.mail) ?? null;
  const waiting = rows.filter(({ state }) => state === 'waiting').length;
  return (
    <>
      <PageHead
        title="Mail"
        aside={
          waiting > 0
            ? `${waiting} wait for the mail server and are tried again`
            : 'Every mail the product wrote, newest first'
        }
      />
      <PageBody>
        {mails.isError ? (
          <ErrorState
            error={mails.error}
            what="The mail tray"
            who="Administrators"
            onRetry={() => void mails.refetch()}
          />
        ) : (
          <div className="grid gap-3.5 xl:grid-cols-[minmax(0,1fr)_26rem]">
            <Panel title="Outbox" flush>
              {mails.isPending ? (
                <Skeleton />
              ) : rows.length === 0 ? (
                <EmptyState icon="mail" title="No mail yet">
                  Submitting, returning and releasing a plan mails the people concerned.
                </EmptyState>
              ) : (
                <MailTable
                  mails={rows}
                  chosenId={chosen?.id ?? null}
                  onChoose={(mail) => setUrl({ mail })}
                />
              )}
              {mails.hasNextPage && (
                <div className="flex justify-center py-3">
                  <Button
                    busy={mails.isFetchingNextPage}
                    onClick={() => void mails.fetchNextPage()}
                  >
                    Show older mails
                  </Button>
                </div>
              )}
            </Panel>
            {chosen && <MailLetter mail={chosen} />}
          </div>
        )}
      </PageBody>
    </>
  );
}
