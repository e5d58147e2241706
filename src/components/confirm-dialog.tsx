import type { ReactNode } from 'react';
import { Button } from './button.tsx';
import { Dialog } from './dialog.tsx';

interface ConfirmDialogProps {
  open: boolean;
  onOpenChange: (open: boolean) => void;
  title: string;
  description: ReactNode;
  /** The deed by its name, never "OK". */
  confirm: string;
  look?: 'primary' | 'danger';
  busy?: boolean;
  onConfirm: () => void;
  children?: ReactNode;
}

export function ConfirmDialog(props: ConfirmDialogProps) {
  const { open, onOpenChange, title, description, confirm, look, busy, onConfirm, children } =
    props;
  return (
    <Dialog
      open={open}
      onOpenChange={onOpenChange}
      title={title}
      description={description}
      actions={
        <>
          <Button onClick={() => onOpenChange(false)}>Cancel</Button>
          <Button look={look ?? 'danger'} busy={busy ?? false} onClick={onConfirm}>
            {confirm}
          </Button>
        </>
      }
    >
      {children}
    </Dialog>
  );
}
