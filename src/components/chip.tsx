import type { ReactNode } from 'react';
import { classNames } from '../lib/class-names.ts';
import { Icon, type IconName } from './icon.tsx';

export type Tone = 'ok' | 'info' | 'warn' | 'danger' | 'neutral';

const SOFT: Record<Tone, string> = {
  ok: 'bg-ok-soft text-ok-text',
  info: 'bg-info-soft text-info-text',
  warn: 'bg-warn-soft text-warn-text',
  danger: 'bg-danger-soft text-danger-text',
  neutral: 'bg-neutral-soft text-neutral-text',
};
const TEXT: Record<Tone, string> = {
  ok: 'text-ok-text',
  info: 'text-info-text',
  warn: 'text-warn-text',
  danger: 'text-danger-text',
  neutral: 'text-ink-muted',
};

interface Props {
  tone: Tone;
  icon: IconName;
  children: ReactNode;
  className?: string;
}

/** A state: a shape of its own, the word, the colour; never the colour alone. */
export function Chip({ tone, icon, children, className }: Props) {
  return (
    <span
      className={classNames(
        'inline-flex min-h-5.5 items-center gap-1.5 rounded-chip px-2 text-caption font-semibold whitespace-nowrap',
        SOFT[tone],
        className,
      )}
    >
      <Icon name={icon} size={14} />
      {children}
    </span>
  );
}

/** The same without a ground, for reasons in lists and rows. */
export function ToneWord({ tone, icon, children, className }: Props) {
  return (
    <span
      className={classNames(
        'inline-flex items-center gap-1.5 text-table font-semibold',
        TEXT[tone],
        className,
      )}
    >
      <Icon name={icon} size={14} />
      {children}
    </span>
  );
}
