import { useId, type ReactNode } from 'react';
import { classNames } from '../lib/class-names.ts';

interface Props {
  title: ReactNode;
  /** Muted words after the title. */
  aside?: ReactNode;
  /** At the right end of the head. */
  actions?: ReactNode;
  children: ReactNode;
  className?: string;
  /** The content runs to the edges (tables). */
  flush?: boolean;
  level?: 2 | 3;
}

/** A sheet of paper: one rule around, no shadow. */
export function Panel({ title, aside, actions, children, className, flush, level = 2 }: Props) {
  const id = useId();
  const Heading = level === 2 ? 'h2' : 'h3';
  return (
    <section
      aria-labelledby={id}
      className={classNames('min-w-0 rounded-panel border border-line bg-surface', className)}
    >
      <div className="flex flex-wrap items-center gap-x-3 gap-y-1 px-4 pt-3 pb-2">
        <Heading id={id} className="text-section font-semibold">
          {title}
        </Heading>
        {aside && <div className="text-table text-ink-muted">{aside}</div>}
        {actions && <div className="ml-auto flex flex-wrap items-center gap-2">{actions}</div>}
      </div>
      <div className={flush ? 'pb-1' : 'px-4 pb-4'}>{children}</div>
    </section>
  );
}

/** A head and its list inside a side column. */
export function SideSection({
  title,
  aside,
  children,
}: {
  title: ReactNode;
  aside?: ReactNode;
  children: ReactNode;
}) {
  const id = useId();
  return (
    <section
      aria-labelledby={id}
      className="border-t border-line-soft px-4.5 py-3.5 first:border-t-0"
    >
      <div className="mb-2 flex items-baseline gap-2">
        <h2 id={id} className="text-section font-semibold">
          {title}
        </h2>
        {aside && <span className="ml-auto text-table text-ink-muted">{aside}</span>}
      </div>
      {children}
    </section>
  );
}
