import {
  createContext,
  use,
  useId,
  useRef,
  type ComponentProps,
  type KeyboardEvent,
  type ReactNode,
} from 'react';
import { classNames } from '../lib/class-names.ts';
import { Icon, type IconName } from './icon.tsx';

/**
 * A list of acts that opens from a button. The browser's own popover: it closes on Escape and on a press
 * elsewhere and needs no positioning library in the entry chunk.
 */
const CloseContext = createContext<() => void>(() => undefined);

const GAP = 6;

function place(button: HTMLElement, list: HTMLElement): void {
  const { bottom, right, left } = button.getBoundingClientRect();
  const fromRight = Math.max(8, window.innerWidth - right);
  list.style.top = `${bottom + GAP}px`;
  if (right > window.innerWidth / 2)
    Object.assign(list.style, { right: `${fromRight}px`, left: 'auto' });
  else Object.assign(list.style, { left: `${Math.max(8, left)}px`, right: 'auto' });
}

const ITEMS = 'button:not(:disabled), a[href]';

/** Arrows walk through the list, Home and End jump. */
function walk(event: KeyboardEvent<HTMLElement>): void {
  const steps: Record<string, number> = {
    ArrowDown: 1,
    ArrowUp: -1,
    Home: -Infinity,
    End: Infinity,
  };
  const step = steps[event.key];
  if (step === undefined) return;
  event.preventDefault();
  const items = [...event.currentTarget.querySelectorAll<HTMLElement>(ITEMS)];
  const at = items.findIndex((item) => item === document.activeElement);
  items[Math.max(0, Math.min(items.length - 1, at + step))]?.focus();
}

interface MenuProps {
  /** What the opening button shows. */
  face: ReactNode;
  buttonClassName?: string;
  buttonProps?: ComponentProps<'button'>;
  children: ReactNode;
}

export function Menu({ face, buttonClassName, buttonProps, children }: MenuProps) {
  const id = useId();
  const button = useRef<HTMLButtonElement>(null);
  const list = useRef<HTMLDivElement>(null);
  const close = (): void => list.current?.hidePopover();
  return (
    <>
      <button
        ref={button}
        type="button"
        popoverTarget={id}
        className={buttonClassName}
        {...buttonProps}
      >
        {face}
      </button>
      <div
        ref={list}
        id={id}
        popover="auto"
        onKeyDown={walk}
        onBeforeToggle={() => {
          if (button.current && list.current) place(button.current, list.current);
        }}
        onToggle={(event) => {
          if (event.newState === 'open') list.current?.querySelector<HTMLElement>(ITEMS)?.focus();
        }}
        className="m-0 min-w-52 rounded-panel border border-line bg-surface p-1 text-ink shadow-float"
      >
        <CloseContext value={close}>{children}</CloseContext>
      </div>
    </>
  );
}

const ITEM =
  'flex min-h-8 w-full items-center gap-2.5 rounded-chip px-2.5 text-left text-body hover:enabled:bg-accent-soft focus-visible:bg-accent-soft focus-visible:-outline-offset-2 disabled:opacity-50 [a&]:hover:bg-accent-soft';

interface ItemProps {
  icon?: IconName;
  onSelect: () => void;
  disabled?: boolean;
  children: ReactNode;
}

export function MenuItem({ icon, onSelect, disabled, children }: ItemProps) {
  const close = use(CloseContext);
  return (
    <button
      type="button"
      className={ITEM}
      disabled={disabled}
      onClick={() => {
        close();
        onSelect();
      }}
    >
      {icon && <Icon name={icon} className="text-ink-muted" />}
      {children}
    </button>
  );
}

/** A file to take away. */
export function MenuDownload({ href, children }: { href: string; children: ReactNode }) {
  const close = use(CloseContext);
  return (
    <a className={ITEM} href={href} download onClick={close}>
      <Icon name="file" className="text-ink-muted" />
      {children}
    </a>
  );
}

interface ChoiceProps<T extends string> {
  label: string;
  value: T;
  onChange: (value: T) => void;
  options: readonly { value: T; word: string; icon?: IconName }[];
}

export function MenuChoice<T extends string>({ label, value, onChange, options }: ChoiceProps<T>) {
  const id = useId();
  return (
    <div role="group" aria-labelledby={id}>
      <p id={id} className="px-2.5 pt-1.5 pb-1 text-caption text-ink-muted">
        {label}
      </p>
      {options.map((option) => (
        <button
          key={option.value}
          type="button"
          aria-pressed={option.value === value}
          className={classNames(ITEM, option.value === value && 'font-semibold')}
          onClick={() => onChange(option.value)}
        >
          {option.icon && <Icon name={option.icon} className="text-ink-muted" />}
          <span className="flex-1">{option.word}</span>
          {option.value === value && <Icon name="check" className="text-accent" />}
        </button>
      ))}
    </div>
  );
}

export const MenuRule = () => <div role="separator" className="my-1 h-px bg-line-soft" />;
