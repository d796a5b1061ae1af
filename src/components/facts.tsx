import type { ReactNode } from 'react';
import { classNames } from '../lib/class-names.ts';

/** Name and value, a rule between. */
export function Facts({
  rows,
  className,
}: {
  rows: readonly (readonly [name: ReactNode, value: ReactNode])[];
  className?: string;
}) {
  return (
    <dl className={classNames('figures', className)}>
      {rows.map(([name, value], index) => (
        <div
          key={index}
          className="flex items-baseline justify-between gap-4 border-t border-line-soft py-1.5 first:border-t-0"
        >
          <dt className="text-ink-muted">{name}</dt>
          <dd className="text-right">{value}</dd>
        </div>
      ))}
    </dl>
  );
}
