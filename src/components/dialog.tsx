import { Dialog as Radix } from 'radix-ui';
import type { ReactNode } from 'react';
import { classNames } from '../lib/class-names.ts';
import { IconButton } from './button.tsx';

interface Props {
  open: boolean;
  onClose: () => void;
  title: ReactNode;
  /** One line under the title. */
  description?: ReactNode;
  children: ReactNode;
  /** Buttons at the foot; the least harmful one first. */
  footer?: ReactNode;
  wide?: boolean;
}

/** Focus goes in, stays in, Escape closes, focus returns to the opener. */
export function Dialog({ open, onClose, title, description, children, footer, wide }: Props) {
  return (
    <Radix.Root open={open} onOpenChange={(next) => !next && onClose()}>
      <Radix.Portal>
        <Radix.Overlay className="fixed inset-0 z-40 bg-[rgb(10_14_20/0.38)]" />
        <Radix.Content
          {...(description ? {} : { 'aria-describedby': undefined })}
          className={classNames(
            'fixed top-[8vh] left-1/2 z-50 flex max-h-[84vh] w-[calc(100vw-2rem)] -translate-x-1/2 flex-col rounded-panel border border-line bg-surface shadow-float',
            wide ? 'max-w-190' : 'max-w-125',
          )}
        >
          <div className="flex items-start gap-3 border-b border-line-soft px-4.5 py-3">
            <div className="min-w-0 flex-1">
              <Radix.Title className="text-section font-semibold">{title}</Radix.Title>
              {description && (
                <Radix.Description className="mt-0.5 text-table text-ink-muted">
                  {description}
                </Radix.Description>
              )}
            </div>
            <Radix.Close asChild>
              <IconButton icon="close" label="Close" className="-mt-1 -mr-2" />
            </Radix.Close>
          </div>
          <div className="min-h-0 flex-1 overflow-y-auto px-4.5 py-4">{children}</div>
          {footer && (
            <div className="flex flex-wrap items-center justify-end gap-2 border-t border-line-soft bg-raised px-4.5 py-3">
              {footer}
            </div>
          )}
        </Radix.Content>
      </Radix.Portal>
    </Radix.Root>
  );
}
