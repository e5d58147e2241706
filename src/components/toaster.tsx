import { useEffect } from 'react';
import { X } from 'lucide-react';
import { dismissToast, useToasts, type Toast } from '#src/lib/toasts.ts';
import { Button, IconButton } from './button.tsx';
import { Notice } from './notice.tsx';

const PLAIN_MS = 6_000;
/** What offers an undo must not run away from a slow reader. */
const WITH_ACTION_MS = 20_000;

function ToastNotice({ toast }: { toast: Toast }) {
  const stays = toast.tone === 'fault';
  useEffect(() => {
    if (stays) return;
    const after = toast.action ? WITH_ACTION_MS : PLAIN_MS;
    const timer = setTimeout(() => dismissToast(toast.id), after);
    return () => clearTimeout(timer);
  }, [toast, stays]);
  return (
    <Notice
      tone={toast.tone}
      className="pointer-events-auto w-full max-w-lg items-center shadow"
      actions={
        <>
          {toast.action && (
            <Button
              size="small"
              onClick={() => {
                toast.action?.run();
                dismissToast(toast.id);
              }}
            >
              {toast.action.label}
            </Button>
          )}
          <IconButton
            label="Dismiss"
            className="-my-1 size-8!"
            onClick={() => dismissToast(toast.id)}
          >
            <X aria-hidden="true" className="size-4" />
          </IconButton>
        </>
      }
    >
      {toast.message}
    </Notice>
  );
}

/** Always in the page, so that what appears in it is read out. */
export function Toaster() {
  const toasts = useToasts();
  return (
    <div
      role="status"
      data-screen-only
      className="pointer-events-none fixed inset-x-0 bottom-0 z-60 flex flex-col items-center gap-2 p-4"
    >
      {toasts.map((toast) => (
        <ToastNotice key={toast.id} toast={toast} />
      ))}
    </div>
  );
}
