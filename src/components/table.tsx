import type { ComponentProps, ReactNode } from 'react';
import { classNames } from '../lib/class-names.ts';
import { Icon } from './icon.tsx';

/** Native tables: horizontal rules only, heads that stay, numbers to the right, the unit in the head. */
interface TableProps {
  caption: string;
  children: ReactNode;
  className?: string;
  /** Scrolls by itself under heads that stay. */
  fill?: boolean;
  /** In a side column: the outer cells have no margin. */
  bare?: boolean;
}

export function Table({ caption, children, className, fill, bare }: TableProps) {
  return (
    <div
      className={classNames(
        'relative',
        fill ? 'max-h-[calc(100dvh-12.5rem)] min-h-60 overflow-auto' : 'overflow-x-auto',
      )}
      tabIndex={0}
      role="region"
      aria-label={caption}
    >
      <table
        className={classNames(
          'w-full border-separate border-spacing-0 text-table',
          fill &&
            '[&_thead_th]:sticky [&_thead_th]:top-0 [&_thead_th]:z-10 [&_thead_th]:bg-surface',
          bare &&
            '[&_td:first-child]:pl-0 [&_td:last-child]:pr-0 [&_th:first-child]:pl-0 [&_th:last-child]:pr-0',
          className,
        )}
      >
        <caption className="sr-only">{caption}</caption>
        {children}
      </table>
    </div>
  );
}

interface HeadProps extends Omit<ComponentProps<'th'>, 'aria-sort'> {
  num?: boolean;
  unit?: string;
  sorted?: 'ascending' | 'descending' | 'none';
  onSort?: () => void;
}

export function Head({ num, unit, sorted, onSort, children, className, ...rest }: HeadProps) {
  const words = (
    <>
      {children}
      {unit && <span className="font-normal"> {unit}</span>}
    </>
  );
  return (
    <th
      scope="col"
      aria-sort={onSort ? (sorted ?? 'none') : undefined}
      className={classNames(
        'border-b border-line px-2 py-1.5 text-caption font-medium whitespace-nowrap text-ink-muted first:pl-4 last:pr-4',
        num ? 'text-right' : 'text-left',
        className,
      )}
      {...rest}
    >
      {onSort ? (
        <button
          type="button"
          onClick={onSort}
          className="inline-flex min-h-6 items-center gap-1 rounded-mark hover:text-ink"
        >
          {words}
          <Icon
            name="chevronDown"
            size={12}
            className={classNames(
              sorted === 'ascending' && 'rotate-180',
              (sorted ?? 'none') === 'none' && 'opacity-35',
            )}
          />
        </button>
      ) : (
        words
      )}
    </th>
  );
}

interface CellProps extends ComponentProps<'td'> {
  num?: boolean;
  strong?: boolean;
  muted?: boolean;
}

export function Cell({ num, strong, muted, className, ...rest }: CellProps) {
  return (
    <td
      className={classNames(
        'border-b border-line-soft px-2 py-1.5 align-middle first:pl-4 last:pr-4',
        num && 'text-right whitespace-nowrap',
        strong && 'font-semibold',
        muted && 'text-ink-muted',
        className,
      )}
      {...rest}
    />
  );
}

/** The cell that names its row. */
export function RowHead({ className, ...rest }: ComponentProps<'th'>) {
  return (
    <th
      scope="row"
      className={classNames(
        'border-b border-line-soft px-2 py-1.5 text-left align-middle font-semibold first:pl-4',
        className,
      )}
      {...rest}
    />
  );
}
