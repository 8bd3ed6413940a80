import type { ReactNode } from 'react';
import { Button } from './Button.tsx';
import { Dialog, DialogButtons } from './Dialog.tsx';

interface ConfirmDialogProps {
  open: boolean;
  onOpenChange: (open: boolean) => void;
  title: string;
  /** What follows from it. */
  children: ReactNode;
  /** The verb on the button: "Deactivate". */
  action: string;
  onConfirm: () => void;
  busy?: boolean;
  look?: 'primary' | 'signal';
}

/** Asks before something that cannot simply be undone. */
export function ConfirmDialog({
  open,
  onOpenChange,
  title,
  children,
  action,
  onConfirm,
  busy = false,
  look = 'signal',
}: ConfirmDialogProps) {
  return (
    <Dialog open={open} onOpenChange={onOpenChange} title={title} description={children}>
      <DialogButtons>
        <Button onClick={() => onOpenChange(false)}>Cancel</Button>
        <Button look={look} busy={busy} onClick={onConfirm}>
          {action}
        </Button>
      </DialogButtons>
    </Dialog>
  );
}
