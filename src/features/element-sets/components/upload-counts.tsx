import type { ReactNode } from 'react';
import { Icon, type IconName } from '../../../components/icon.tsx';

interface CountProps {
  icon: IconName;
  tone: string;
  count: number;
  word: string;
  children: ReactNode;
}

/** The answer first: one number and what it means. */
export function UploadCount({ icon, tone, count, word, children }: CountProps) {
  return (
    <div className="flex items-center gap-3.5 border-line px-4 py-3 not-first:border-l">
      <Icon name={icon} size={18} className={tone} />
      <div>
        <p className="text-section font-semibold">
          <span className="text-page">{count}</span> {word}
        </p>
        <p className="text-caption text-ink-muted">{children}</p>
      </div>
    </div>
  );
}
