import { useRef, type ReactNode } from 'react';
import { X } from 'lucide-react';
import { Dialog as Radix } from 'radix-ui';
import { IconButton } from './button.tsx';

interface DialogProps {
  open: boolean;
  onOpenChange: (open: boolean) => void;
  title: string;
  /** What is at stake, in a sentence or two: read out together with the title. */
  description?: ReactNode;
  children?: ReactNode;
  /** Buttons, the plainest first; they stand at the foot. */
  actions?: ReactNode;
  width?: 'narrow' | 'wide';
}

/**
 * A dialog with trapped and returned focus. Radix's Overlay is left out on purpose: it writes a style element, which the content
 * policy refuses; `data-modal` keeps the page still in its place (base.css).
 */
export function Dialog(props: DialogProps) {
  const { open, onOpenChange, title, description, children, actions, width = 'narrow' } = props;
  // The dialog itself receives focus, so that its title is read and no button is pressed by accident.
  const content = useRef<HTMLDivElement>(null);
  /** What had the focus before: Radix gives it back to its own trigger alone, and these dialogs have none. */
  const opener = useRef<Element>(null);
  return (
    <Radix.Root open={open} onOpenChange={onOpenChange}>
      <Radix.Portal>
        <div data-modal className="fixed inset-0 z-40 bg-[rgb(20_14_8/0.45)]" />
        <div className="pointer-events-none fixed inset-0 z-50 grid place-items-center p-4">
          <Radix.Content
            ref={content}
            {...(description ? {} : { 'aria-describedby': undefined })}
            onOpenAutoFocus={(event) => {
              const first = content.current?.querySelector<HTMLElement>('[data-autofocus]');
              event.preventDefault();
              opener.current = document.activeElement;
              (first ?? content.current)?.focus();
            }}
            onCloseAutoFocus={(event) => {
              event.preventDefault();
              const lost = document.activeElement === document.body;
              if (lost && opener.current instanceof HTMLElement) opener.current.focus();
            }}
            className={`pointer-events-auto flex max-h-full w-full flex-col gap-4 overflow-y-auto rounded border border-line bg-sheet p-5 shadow ${width === 'wide' ? 'max-w-3xl' : 'max-w-lg'}`}
          >
            <div className="flex items-start justify-between gap-4">
              <Radix.Title className="font-display text-xl font-semibold">{title}</Radix.Title>
              <Radix.Close asChild>
                <IconButton label="Close" className="-mt-1.5 -mr-2">
                  <X aria-hidden="true" className="size-5" />
                </IconButton>
              </Radix.Close>
            </div>
            {description && (
              <Radix.Description asChild>
                <div className="text-muted">{description}</div>
              </Radix.Description>
            )}
            {children}
            {actions && <div className="flex flex-wrap justify-end gap-2 pt-1">{actions}</div>}
          </Radix.Content>
        </div>
      </Radix.Portal>
    </Radix.Root>
  );
}
