import { useId, type ComponentProps, type ReactNode } from 'react';
import { CircleAlert } from 'lucide-react';
import { classNames } from '#src/lib/class-names.ts';

/** What a control needs to belong to its label, hint and error. */
export interface ControlProps {
  id: string;
  'aria-describedby'?: string;
  'aria-invalid'?: true;
}

export interface FieldProps {
  label: ReactNode;
  hint?: ReactNode;
  error?: ReactNode;
  className?: string;
  children: (control: ControlProps) => ReactNode;
}

/** Label above, hint below, and beside the control what is wrong in words. */
export function Field({ label, hint, error, className, children }: FieldProps) {
  const id = useId();
  const hintId = `${id}-hint`;
  const errorId = `${id}-error`;
  const described = classNames(error ? errorId : null, hint ? hintId : null);
  return (
    <div className={classNames('flex flex-col gap-1', className)}>
      <label htmlFor={id} className="text-sm text-muted">
        {label}
      </label>
      {children({
        id,
        ...(described ? { 'aria-describedby': described } : {}),
        ...(error ? { 'aria-invalid': true as const } : {}),
      })}
      {error && <FieldError id={errorId}>{error}</FieldError>}
      {hint && (
        <p id={hintId} className="text-xs text-muted">
          {hint}
        </p>
      )}
    </div>
  );
}

export function FieldError({ id, children }: { id?: string; children: ReactNode }) {
  return (
    <p id={id} className="flex gap-1.5 text-sm text-fault">
      <CircleAlert aria-hidden="true" className="mt-0.5 size-4 shrink-0" />
      <span>{children}</span>
    </p>
  );
}

export const controlClasses =
  'min-h-9 w-full rounded border border-edge bg-paper px-2.5 py-1.5 text-base text-ink ' +
  'invalid-field:border-fault invalid-field:bg-fault-soft disabled:opacity-60';

export function TextInput({ className, ...rest }: ComponentProps<'input'>) {
  return <input type="text" {...rest} className={classNames(controlClasses, className)} />;
}

export function TextArea({ className, ...rest }: ComponentProps<'textarea'>) {
  return <textarea rows={3} {...rest} className={classNames(controlClasses, className)} />;
}
