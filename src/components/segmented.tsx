import { classNames } from '../lib/class-names.ts';

interface Props<T extends string> {
  label: string;
  options: readonly { value: T; label: string; disabled?: boolean }[];
  value: T;
  onChange: (value: T) => void;
  size?: 'small' | 'normal';
}

/** One of a few ways to see the same thing; one tab stop a button, the chosen one is pressed. */
export function Segmented<T extends string>({
  label,
  options,
  value,
  onChange,
  size = 'normal',
}: Props<T>) {
  return (
    <div
      role="group"
      aria-label={label}
      className="inline-flex max-w-full flex-wrap rounded-control border border-line-strong bg-surface"
    >
      {options.map((option) => (
        <button
          key={option.value}
          type="button"
          aria-pressed={option.value === value}
          disabled={option.disabled}
          onClick={() => onChange(option.value)}
          className={classNames(
            'border-l border-line px-3 text-table whitespace-nowrap first:rounded-l-[4px] first:border-l-0 last:rounded-r-[4px] disabled:opacity-50',
            size === 'small' ? 'min-h-6.5' : 'min-h-7.5',
            option.value === value
              ? 'bg-ink font-medium text-surface'
              : 'text-ink-muted hover:enabled:text-ink',
          )}
        >
          {option.label}
        </button>
      ))}
    </div>
  );
}
