import type { ReactNode } from 'react';
import { ApiError, isForbidden, isNotFound, wordsOf } from '../lib/api-error.ts';
import { useDelayed } from '../hooks/use-delayed.ts';
import { Button } from './button.tsx';
import { Icon, type IconName } from './icon.tsx';

/** Grey bars of the shape that will come; nothing for the first 200 ms. */
export function Skeleton({ rows = 6, words = 'Loading' }: { rows?: number; words?: string }) {
  const shown = useDelayed();
  return (
    <div role="status" aria-label={words} className="px-4 py-3">
      {shown &&
        Array.from({ length: rows }, (_, row) => (
          <div key={row} className="flex gap-4 border-b border-line-soft py-2.5 last:border-b-0">
            <span className="h-3 w-1/5 animate-pulse rounded-mark bg-shade" />
            <span
              className="h-3 animate-pulse rounded-mark bg-shade"
              style={{ width: `${22 + ((row * 37) % 30)}%` }}
            />
            <span className="ml-auto h-3 w-1/12 animate-pulse rounded-mark bg-shade" />
          </div>
        ))}
    </div>
  );
}

interface MessageProps {
  icon: IconName;
  title: ReactNode;
  children?: ReactNode;
  action?: ReactNode;
  tone?: 'danger' | 'plain';
  alert?: boolean;
}

function Message({ icon, title, children, action, tone = 'plain', alert }: MessageProps) {
  return (
    <div
      role={alert ? 'alert' : undefined}
      className="mx-auto flex max-w-120 flex-col items-center px-4 py-10 text-center"
    >
      <Icon
        name={icon}
        size={28}
        className={tone === 'danger' ? 'text-danger-mark' : 'text-ink-faint'}
      />
      <p className="mt-3 text-section font-semibold">{title}</p>
      {children && <div className="mt-1 text-body text-ink-muted">{children}</div>}
      {action && <div className="mt-4 flex gap-2">{action}</div>}
    </div>
  );
}

/** What belongs here and the one next step; good news gets no button. */
export function EmptyState(props: {
  icon?: IconName;
  title: ReactNode;
  children?: ReactNode;
  action?: ReactNode;
}) {
  return <Message icon={props.icon ?? 'info'} {...props} />;
}

/** Which role may, for those who may not. */
export function Forbidden({ what, who }: { what: string; who: string }) {
  return (
    <Message icon="lock" title={`${what} is not open to you`}>
      {who} may see it. Ask the administrator of your station if your work needs it.
    </Message>
  );
}

/** What failed, why if known, another try, and the number to tell. */
export function ErrorState({
  error,
  what,
  onRetry,
  who = 'People with another role',
}: {
  error: unknown;
  what: string;
  onRetry?: () => void;
  who?: string;
}) {
  if (isForbidden(error)) return <Forbidden what={what} who={who} />;
  const requestId = error instanceof ApiError ? error.requestId : null;
  return (
    <Message
      icon="needsAttention"
      tone="danger"
      alert
      title={isNotFound(error) ? `${what} does not exist` : `${what} could not be read`}
      action={onRetry && !isNotFound(error) && <Button onClick={onRetry}>Try again</Button>}
    >
      <p>{wordsOf(error)}</p>
      {requestId && <p className="mt-1 font-mono text-mono text-ink-faint">request {requestId}</p>}
    </Message>
  );
}

/** A failed act, beside the button that tried it. */
export function ErrorNote({ error }: { error: unknown }) {
  if (!error) return null;
  const requestId = error instanceof ApiError ? error.requestId : null;
  return (
    <div
      role="alert"
      className="flex items-start gap-2 rounded-control bg-danger-soft px-3 py-2 text-table text-danger-text"
    >
      <Icon name="needsAttention" className="mt-px" />
      <div className="min-w-0">
        {wordsOf(error)}
        {requestId && <div className="mt-0.5 font-mono text-caption">request {requestId}</div>}
      </div>
    </div>
  );
}
