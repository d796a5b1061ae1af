import { useId, type ComponentProps, type ReactNode } from 'react';
import { classNames } from '../lib/class-names.ts';
import { Icon } from './icon.tsx';

interface FieldProps {
  label: ReactNode;
  hint?: ReactNode;
  error?: string | undefined;
  /** After the label, at its right end. */
  labelAside?: ReactNode;
  unit?: string;
  className?: string;
}

interface Wiring {
  id: string;
  'aria-describedby': string | undefined;
  'aria-invalid': true | undefined;
}

/** Label, control, hint and error, wired for those who hear the page. */
export function Field({
  label,
  hint,
  error,
  labelAside,
  unit,
  className,
  children,
}: FieldProps & { children: (wiring: Wiring) => ReactNode }) {
  const id = useId();
  const describedBy = [hint && `${id}-hint`, error && `${id}-error`].filter(Boolean).join(' ');
  return (
    <div className={classNames('flex min-w-0 flex-col gap-1', className)}>
      <div className="flex items-baseline justify-between gap-2">
        <label htmlFor={id} className="text-table font-semibold">
          {label}
          {unit && <span className="font-normal text-ink-muted"> {unit}</span>}
        </label>
        {labelAside}
      </div>
      {children({
        id,
        'aria-describedby': describedBy || undefined,
        'aria-invalid': error ? true : undefined,
      })}
      {hint && (
        <p id={`${id}-hint`} className="text-caption text-ink-muted">
          {hint}
        </p>
      )}
      {error && (
        <p
          id={`${id}-error`}
          className="flex items-start gap-1.5 text-caption font-medium text-danger-text"
        >
          <Icon name="needsAttention" size={14} className="mt-px" />
          {error}
        </p>
      )}
    </div>
  );
}

export const CONTROL =
  'w-full min-w-0 rounded-control border border-line-strong bg-surface px-3 text-body text-ink aria-invalid:border-danger-mark disabled:bg-raised disabled:text-ink-muted';

type TextFieldProps = FieldProps & ComponentProps<'input'> & { large?: boolean };

export function TextField({
  label,
  hint,
  error,
  labelAside,
  unit,
  className,
  large,
  ...input
}: TextFieldProps) {
  return (
    <Field {...{ label, hint, error, labelAside, unit, className }}>
      {(wiring) => (
        <input
          type="text"
          {...wiring}
          {...input}
          className={classNames(
            CONTROL,
            large ? 'min-h-10' : 'min-h-8',
            input.inputMode === 'decimal' && 'figures',
          )}
        />
      )}
    </Field>
  );
}

type SelectFieldProps = FieldProps & ComponentProps<'select'>;

export function SelectField({
  label,
  hint,
  error,
  labelAside,
  unit,
  className,
  children,
  ...select
}: SelectFieldProps) {
  return (
    <Field {...{ label, hint, error, labelAside, unit, className }}>
      {(wiring) => (
        <select {...wiring} {...select} className={classNames(CONTROL, 'min-h-8 pr-8')}>
          {children}
        </select>
      )}
    </Field>
  );
}

type TextAreaFieldProps = FieldProps & ComponentProps<'textarea'>;

export function TextAreaField({
  label,
  hint,
  error,
  labelAside,
  unit,
  className,
  ...area
}: TextAreaFieldProps) {
  return (
    <Field {...{ label, hint, error, labelAside, unit, className }}>
      {(wiring) => (
        <textarea rows={3} {...wiring} {...area} className={classNames(CONTROL, 'py-1.5')} />
      )}
    </Field>
  );
}

type CheckFieldProps = { label: ReactNode; hint?: ReactNode } & ComponentProps<'input'>;

export function CheckField({ label, hint, className, ...input }: CheckFieldProps) {
  const id = useId();
  return (
    <div className={classNames('flex items-start gap-2', className)}>
      <input
        id={id}
        type="checkbox"
        aria-describedby={hint ? `${id}-hint` : undefined}
        {...input}
        className="mt-px size-4.5 shrink-0 accent-accent"
      />
      <div className="min-w-0">
        <label htmlFor={id} className="text-body">
          {label}
        </label>
        {hint && (
          <p id={`${id}-hint`} className="text-caption text-ink-muted">
            {hint}
          </p>
        )}
      </div>
    </div>
  );
}
