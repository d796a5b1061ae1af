import { useQueries, useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import type { AnyContact, PlanSummary } from '../../../../shared/schemas/plan.ts';
import type { Station } from '../../../../shared/schemas/station.ts';
import { Button } from '../../../components/button.tsx';
import { Panel } from '../../../components/panel.tsx';
import { Skeleton } from '../../../components/states.tsx';
import { useNow } from '../../../hooks/use-now.ts';
import { clockSeconds, countdown } from '../../../lib/format-time.ts';
import { planQueries } from '../../../queries/plan-queries.ts';
import { stationQueries } from '../../../queries/station-queries.ts';
import { shiftContacts, splitShift, type ShiftContact } from '../shift-contacts.ts';
import { ComingTable } from './coming-table.tsx';
import { LogPanel } from './log-panel.tsx';
import { OperateDialog } from './operate-dialog.tsx';
import { RunningTable } from './running-table.tsx';
import { UrgentDialog } from './urgent-dialog.tsx';

interface Props {
  station: Station;
  plans: readonly PlanSummary[];
  mayOperate: boolean;
  mayLog: boolean;
  isOwn: (contact: AnyContact) => boolean;
}

/** What is up, what comes, what has to be logged; the pointing follows the newest element sets. */
export function ShiftBoard({ station, plans, mayOperate, mayLog }: Props) {
  const now = useNow();
  const details = useQueries({ queries: plans.map((plan) => planQueries.one(plan.id)) });
  const logs = useQueries({ queries: plans.map((plan) => planQueries.logs(plan.id)) });
  const channels = useQuery(stationQueries.channels(station.id));
  const [changing, setChanging] = useState<ShiftContact | null>(null);
  const [urgent, setUrgent] = useState(false);
  if (details.some((one) => one.isPending)) return <Skeleton />;
  const contacts = shiftContacts(details.flatMap((one) => one.data ?? []));
  const logged = new Set(logs.flatMap((one) => one.data ?? []).map((log) => log.contactId));
  const { running, coming, toLog } = splitShift(contacts, now, logged);
  const labelOf = (id: string): string => channels.data?.find((one) => one.id === id)?.label ?? '';
  const onChange = mayOperate ? setChanging : null;
  return (
    <>
      <div className="grid items-start gap-3.5 xl:grid-cols-[minmax(0,1fr)_24rem]">
        <div className="flex min-w-0 flex-col gap-3.5">
          <NextAction running={running} coming={coming} now={now} labelOf={labelOf} />
          <Panel
            title={running.length > 0 ? `${running.length} up now` : 'Nothing is up now'}
            aside="soonest end first; pointing from the element sets in use"
            flush
          >
            <RunningTable contacts={running} now={now} labelOf={labelOf} onChange={onChange} />
          </Panel>
          <Panel
            title="Coming"
            flush
            actions={
              mayOperate && (
                <Button size="small" icon="add" onClick={() => setUrgent(true)}>
                  Urgent contact
                </Button>
              )
            }
          >
            <ComingTable
              contacts={coming.slice(0, 24)}
              now={now}
              labelOf={labelOf}
              onChange={onChange}
            />
          </Panel>
        </div>
        <LogPanel contacts={toLog} mayLog={mayLog} />
      </div>
      {changing && (
        <OperateDialog
          subject={changing}
          channels={channels.data ?? []}
          onClose={() => setChanging(null)}
        />
      )}
      {urgent && (
        <UrgentDialog
          station={station}
          plans={details.flatMap((one) => one.data ?? [])}
          labelOf={labelOf}
          onClose={() => setUrgent(false)}
        />
      )}
    </>
  );
}

/** Counts down to the next action: an end or a beginning, whichever comes first. */
function NextAction({
  running,
  coming,
  now,
  labelOf,
}: {
  running: readonly ShiftContact[];
  coming: readonly ShiftContact[];
  now: number;
  labelOf: (id: string) => string;
}) {
  const [ends] = running;
  const [begins] = coming;
  const isEnd = ends !== undefined && (begins === undefined || ends.toMs <= begins.fromMs);
  const next = isEnd ? ends : begins;
  if (!next) return null;
  const atMs = isEnd ? next.toMs : next.fromMs;
  return (
    <section
      aria-label="Next action"
      className="flex flex-wrap items-end gap-x-8 gap-y-2 rounded-panel border border-line bg-surface px-4 py-3"
    >
      <p className="figures text-[3rem] leading-[3.25rem] font-medium">{countdown(atMs - now)}</p>
      <p className="pb-1 text-section">
        <span className="font-semibold">{next.contact.satelliteName}</span>{' '}
        {isEnd ? 'ends' : 'begins'} on {labelOf(next.contact.receive.channelId)}
        <span className="block text-table text-ink-muted">at {clockSeconds(atMs)} UTC</span>
      </p>
    </section>
  );
}
