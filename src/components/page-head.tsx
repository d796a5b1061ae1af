import type { ReactNode } from 'react';

interface Props {
  title: ReactNode;
  /** Beside the title: a state chip. */
  state?: ReactNode;
  /** One line below. */
  aside?: ReactNode;
  actions?: ReactNode;
}

/** Title and state at the left, one primary action at the right. */
export function PageHead({ title, state, aside, actions }: Props) {
  return (
    <div className="flex flex-wrap items-center gap-x-6 gap-y-2 border-b border-line bg-surface px-5 py-2.5">
      <div className="min-w-0">
        <div className="flex flex-wrap items-center gap-x-2.5 gap-y-1">
          <h1 className="text-page font-semibold">{title}</h1>
          {state}
        </div>
        {aside && <div className="mt-0.5 text-table text-ink-muted">{aside}</div>}
      </div>
      {actions && <div className="ml-auto flex flex-wrap items-center gap-2.5">{actions}</div>}
    </div>
  );
}

/** The ground under panels. */
export function PageBody({ children, className }: { children: ReactNode; className?: string }) {
  return <div className={`flex flex-1 flex-col gap-3.5 p-5 ${className ?? ''}`}>{children}</div>;
}
