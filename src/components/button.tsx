import type { ComponentProps } from 'react';
import { LoaderCircle } from 'lucide-react';
import { Link, type LinkProps } from 'react-router-dom';
import { classNames } from '#src/lib/class-names.ts';

export type ButtonLook = 'primary' | 'plain' | 'quiet' | 'danger';
export type ButtonSize = 'normal' | 'small' | 'icon';

const LOOKS: Record<ButtonLook, string> = {
  primary: 'border-barn bg-barn text-paper font-semibold hover:brightness-110',
  plain: 'border-edge bg-sheet text-ink hover:bg-soft',
  quiet: 'border-transparent bg-transparent text-ink hover:bg-soft',
  danger: 'border-fault bg-sheet text-fault font-semibold hover:bg-fault-soft',
};
const SIZES: Record<ButtonSize, string> = {
  normal: 'min-h-9 px-3.5 py-1.5',
  small: 'min-h-7 px-2.5 py-0.5 text-sm',
  icon: 'size-9 justify-center',
};

export function buttonClasses(look: ButtonLook = 'plain', size: ButtonSize = 'normal'): string {
  return classNames(
    'inline-flex items-center justify-center gap-2 rounded border text-base transition-colors',
    'disabled:opacity-55 aria-disabled:opacity-55 whitespace-nowrap select-none no-underline',
    LOOKS[look],
    SIZES[size],
  );
}

interface ButtonProps extends ComponentProps<'button'> {
  look?: ButtonLook;
  size?: ButtonSize;
  /** Work is under way: said to assistive technology, shown by a turning ring, and a second click does nothing. */
  busy?: boolean;
}

export function Button({
  look,
  size,
  busy = false,
  className,
  children,
  onClick,
  ...rest
}: ButtonProps) {
  return (
    <button
      type="button"
      {...rest}
      aria-busy={busy || undefined}
      aria-disabled={busy || undefined}
      onClick={busy ? (event) => event.preventDefault() : onClick}
      className={classNames(buttonClasses(look, size), className)}
    >
      {busy && <LoaderCircle aria-hidden="true" className="size-4 animate-spin" />}
      {children}
    </button>
  );
}

/** A button that bears only a picture: its label is spoken, and shown on hover. */
export function IconButton({
  label,
  look = 'quiet',
  ...rest
}: Omit<ButtonProps, 'size' | 'aria-label' | 'title'> & { label: string }) {
  return <Button {...rest} look={look} size="icon" aria-label={label} title={label} />;
}

export function ButtonLink({
  look,
  size,
  className,
  ...rest
}: LinkProps & { look?: ButtonLook; size?: ButtonSize }) {
  return <Link {...rest} className={classNames(buttonClasses(look, size), className)} />;
}
