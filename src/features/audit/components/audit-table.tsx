import type { AuditEvent } from '../../../../shared/schemas/audit-event.ts';
import { Cell, Head, Table } from '../../../components/table.tsx';
import { dateClockSeconds } from '../../../lib/format-time.ts';

interface Props {
  events: readonly AuditEvent[];
  onFilter: (filter: { action?: string; id?: string }) => void;
}

const FILTER_BUTTON = 'rounded-mark text-left text-accent hover:underline';

export function AuditTable({ events, onFilter }: Props) {
  return (
    <Table caption="Audit events">
      <thead>
        <tr>
          <Head unit="UTC">When</Head>
          <Head>Who</Head>
          <Head>What</Head>
          <Head>Kind</Head>
          <Head>Details</Head>
        </tr>
      </thead>
      <tbody>
        {events.map((event) => (
          <tr key={event.id} className="align-top hover:bg-raised">
            <Cell className="figures whitespace-nowrap">
              {dateClockSeconds(Date.parse(event.atUtc))}
            </Cell>
            <Cell className="whitespace-nowrap">{event.actorName}</Cell>
            <Cell>
              <button
                type="button"
                className="rounded-mark text-left hover:underline"
                title="Only events about this"
                onClick={() => onFilter({ id: event.entityId })}
              >
                {event.summary}
              </button>
            </Cell>
            <Cell>
              <button
                type="button"
                className={FILTER_BUTTON}
                title="Only events of this kind"
                onClick={() => onFilter({ action: event.action })}
              >
                {event.action}
              </button>
            </Cell>
            <Cell>
              <Details details={event.details} />
            </Cell>
          </tr>
        ))}
      </tbody>
    </Table>
  );
}

function Details({ details }: { details: Record<string, unknown> }) {
  if (Object.keys(details).length === 0) return null;
  return (
    <details>
      <summary className="cursor-pointer rounded-mark text-ink-muted">Show</summary>
      <pre className="mt-1 max-w-120 overflow-x-auto rounded-control bg-raised p-2 font-mono text-caption whitespace-pre-wrap">
        {JSON.stringify(details, null, 2)}
      </pre>
    </details>
  );
}
