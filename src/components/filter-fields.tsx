import { useEffect, useId, useState } from 'react';
import { CONTROL } from './field.tsx';

interface SelectProps {
  label: string;
  value: string;
  onChange: (value: string) => void;
  options: readonly (readonly [value: string, word: string])[];
  /** Word for no choice. */
  all?: string;
}

/** Filters stand in one line: label and control side by side. */
export function FilterSelect({ label, value, onChange, options, all = 'All' }: SelectProps) {
  const id = useId();
  return (
    <span className="inline-flex items-center gap-1.5">
      <label htmlFor={id} className="text-table text-ink-muted">
        {label}
      </label>
      <select
        id={id}
        value={value}
        onChange={(event) => onChange(event.target.value)}
        className={`${CONTROL} min-h-7 w-auto! max-w-44 px-2 text-table`}
      >
        <option value="">{all}</option>
        {options.map(([option, word]) => (
          <option key={option} value={option}>
            {word}
          </option>
        ))}
      </select>
    </span>
  );
}

interface TextProps {
  label: string;
  value: string;
  onChange: (value: string) => void;
  type?: 'text' | 'date' | 'number';
  width?: string;
  unit?: string;
}

const SETTLE_MS = 250;

/** Takes effect when typing rests. */
export function FilterText({ label, value, onChange, type = 'text', width, unit }: TextProps) {
  const id = useId();
  const [draft, setDraft] = useState<string | null>(null);
  useEffect(() => {
    if (draft === null) return undefined;
    const timer = window.setTimeout(() => {
      onChange(draft);
      setDraft(null);
    }, SETTLE_MS);
    return () => window.clearTimeout(timer);
  }, [draft, onChange]);
  return (
    <span className="inline-flex items-center gap-1.5">
      <label htmlFor={id} className="text-table text-ink-muted">
        {label}
      </label>
      <input
        id={id}
        type={type}
        value={draft ?? value}
        onChange={(event) => setDraft(event.target.value)}
        className={`${CONTROL} figures min-h-7 px-2 text-table ${width ?? 'w-36!'}`}
      />
      {unit && <span className="text-table text-ink-muted">{unit}</span>}
    </span>
  );
}
