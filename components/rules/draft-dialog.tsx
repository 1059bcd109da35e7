import type { ReactNode } from 'react';
import { Button } from '@/components/ui/button';
import { Dialog } from '@/components/ui/dialog';

/** Asks for what a new draft begins with, and says what keeps it from being written. */
export function DraftDialog({
  title,
  description,
  write,
  busy,
  disabled = false,
  failure,
  onWrite,
  onClose,
  children,
}: {
  title: string;
  description: string;
  /** What the button says. */
  write: string;
  busy: boolean;
  disabled?: boolean;
  failure: string | null | undefined;
  onWrite: () => void;
  onClose: () => void;
  children: ReactNode;
}) {
  return (
    <Dialog
      open
      onOpenChange={(open) => {
        if (!open) onClose();
      }}
      {...{ title, description }}
      actions={
        <>
          <Button kind="primary" busy={busy} disabled={disabled} onClick={onWrite}>
            {write}
          </Button>
          <Button onClick={onClose}>Not now</Button>
          <p role="alert" className="w-full font-semibold text-alarm empty:hidden">
            {failure}
          </p>
        </>
      }
    >
      {children}
    </Dialog>
  );
}
