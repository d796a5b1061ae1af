import type { ComponentProps, ReactNode } from 'react';
import { Link, type LinkProps } from 'react-router-dom';
import { classNames } from '../lib/class-names.ts';
import { Icon, type IconName } from './icon.tsx';

type Variant = 'primary' | 'outline' | 'quiet' | 'danger';
type Size = 'small' | 'normal' | 'large';

interface Look {
  variant?: Variant;
  size?: Size;
  icon?: IconName;
  children?: ReactNode;
}

const VARIANT: Record<Variant, string> = {
  primary:
    'bg-accent text-on-accent border-accent hover:enabled:bg-accent/90 [a&]:hover:bg-accent/90',
  outline: 'bg-surface text-ink border-line-strong hover:enabled:bg-raised [a&]:hover:bg-raised',
  quiet:
    'bg-transparent text-ink-muted border-transparent hover:enabled:text-ink hover:enabled:bg-ink/5 [a&]:hover:bg-ink/5',
  danger:
    'bg-surface text-danger-text border-danger-mark hover:enabled:bg-danger-soft [a&]:hover:bg-danger-soft',
};
const SIZE: Record<Size, string> = {
  small: 'min-h-7 px-2.5 py-0.5 text-table gap-1.5',
  normal: 'min-h-8 px-3.5 py-1 text-body gap-2',
  large: 'min-h-10 px-4 py-2 text-body gap-2',
};

/** How a button looks, for what must look like one without being one of ours. */
export const buttonLook = (variant: Variant, size: Size, className?: string): string =>
  classNames(
    'inline-flex items-center justify-center rounded-control border font-medium whitespace-nowrap transition-colors duration-control select-none',
    'disabled:opacity-55 disabled:cursor-not-allowed aria-disabled:opacity-55',
    VARIANT[variant],
    SIZE[size],
    className,
  );

type ButtonProps = Look & ComponentProps<'button'> & { busy?: boolean };

/** `busy`: the act is under way; the button keeps its word and takes no second press. */
export function Button({
  variant = 'outline',
  size = 'normal',
  icon,
  busy = false,
  className,
  children,
  type = 'button',
  disabled,
  ...rest
}: ButtonProps) {
  return (
    <button
      type={type}
      className={buttonLook(variant, size, className)}
      disabled={disabled === true || busy}
      aria-busy={busy || undefined}
      {...rest}
    >
      {busy ? <Spinner /> : icon && <Icon name={icon} />}
      {children}
    </button>
  );
}

type ButtonLinkProps = Look & LinkProps;

export function ButtonLink({
  variant = 'outline',
  size = 'normal',
  icon,
  className,
  children,
  ...rest
}: ButtonLinkProps) {
  return (
    <Link className={buttonLook(variant, size, className)} {...rest}>
      {icon && <Icon name={icon} />}
      {children}
    </Link>
  );
}

interface IconButtonProps extends Omit<ComponentProps<'button'>, 'children'> {
  icon: IconName;
  label: string;
  variant?: Variant;
}

/** For close, lock, step: the few that stand without a word and carry a name instead. */
export function IconButton({
  icon,
  label,
  variant = 'quiet',
  className,
  ...rest
}: IconButtonProps) {
  return (
    <button
      type="button"
      aria-label={label}
      title={label}
      className={classNames(
        'inline-flex size-8 items-center justify-center rounded-control border transition-colors duration-control disabled:cursor-not-allowed disabled:opacity-45',
        VARIANT[variant],
        className,
      )}
      {...rest}
    >
      <Icon name={icon} />
    </button>
  );
}

export function Spinner() {
  return (
    <svg width="16" height="16" viewBox="0 0 16 16" aria-hidden="true" className="animate-spin">
      <circle
        cx="8"
        cy="8"
        r="6"
        fill="none"
        stroke="currentColor"
        strokeWidth="1.5"
        opacity=".3"
      />
      <path d="M8 2a6 6 0 0 1 6 6" fill="none" stroke="currentColor" strokeWidth="1.5" />
    </svg>
  );
}
