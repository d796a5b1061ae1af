import { useId, useState } from 'react';
import { Day } from '../../shared/schemas/common.ts';
import { nextDay } from '../lib/format-time.ts';
import { IconButton } from './button.tsx';
import { CONTROL } from './field.tsx';

interface Props {
  label: string;
  value: string;
  onChange: (day: string) => void;
}

/** A UTC day in ISO order, whatever the machine's own habit, with steps to its neighbours. */
export function DayField({ label, value, onChange }: Props) {
  const id = useId();
  const [draft, setDraft] = useState<string | null>(null);
  const isDay = draft === null || Day.safeParse(draft).success;
  const settle = (): void => {
    if (draft !== null && isDay) onChange(draft);
    setDraft(null);
  };
  return (
    <span className="inline-flex items-center gap-1">
      <label htmlFor={id} className="mr-0.5 text-table text-ink-muted">
        {label}
      </label>
      <IconButton
        icon="chevronLeft"
        label="One day earlier"
        variant="outline"
        className="size-7!"
        onClick={() => onChange(nextDay(value, -1))}
      />
      <input
        id={id}
        value={draft ?? value}
        aria-invalid={isDay ? undefined : true}
        placeholder="2026-12-01"
        size={10}
        onChange={(event) => setDraft(event.target.value)}
        onBlur={settle}
        onKeyDown={(event) => event.key === 'Enter' && settle()}
        className={`${CONTROL} figures min-h-7 w-26! px-2 text-table`}
      />
      <IconButton
        icon="chevronRight"
        label="One day later"
        variant="outline"
        className="size-7!"
        onClick={() => onChange(nextDay(value, 1))}
      />
    </span>
  );
}
