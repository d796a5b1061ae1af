import { useInfiniteQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { Button } from '../../../../components/button.tsx';
import { Skeleton } from '../../../../components/states.tsx';
import { dateClock } from '../../../../lib/format-time.ts';
import { auditQueries } from '../../../../queries/audit-queries.ts';

/** Who changed what of this contact; read only when asked for. */
export function ContactHistory({ contactId }: { contactId: string }) {
  const [open, setOpen] = useState(false);
  return (
    <section aria-label="History" className="mt-3 border-t border-line-soft pt-2">
      <Button
        variant="quiet"
        size="small"
        className="-ml-2.5"
        aria-expanded={open}
        onClick={() => setOpen(!open)}
      >
        {open ? 'Hide the history' : 'Show the history'}
      </Button>
      {open && <Events contactId={contactId} />}
    </section>
  );
}

function Events({ contactId }: { contactId: string }) {
  const events = useInfiniteQuery(auditQueries.events({ entityId: contactId }));
  if (!events.data) return <Skeleton rows={2} />;
  const items = events.data.pages.flatMap((page) => page.items);
  if (items.length === 0)
    return <p className="text-ink-muted">Nothing but the assignment is recorded.</p>;
  return (
    <ul>
      {items.map((event) => (
        <li key={event.id} className="py-1">
          <span className="figures text-caption text-ink-muted">
            {dateClock(Date.parse(event.atUtc))} UTC, {event.actorName}
          </span>
          <br />
          {event.summary}
        </li>
      ))}
    </ul>
  );
}
