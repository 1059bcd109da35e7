'use client';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { Dialog } from '@/components/ui/dialog';

export function LeaveDialog({
  onStay,
  onLeave,
  onSave,
}: {
  onStay: () => void;
  onLeave: () => void;
  /** Null where it went well, else why not. */
  onSave: () => Promise<string | null>;
}) {
  const [busy, setBusy] = useState(false);
  const [failure, setFailure] = useState<string | null>(null);
  return (
    <Dialog
      open
      onOpenChange={(open) => {
        if (!open) onStay();
      }}
      title="Leave with unsaved changes?"
      description="What you typed into this rule is not saved. What is in force is not touched either way."
      actions={
        <>
          <Button kind="primary" onClick={onStay}>
            Stay here
          </Button>
          <Button
            busy={busy}
            onClick={() => {
              setBusy(true);
              void onSave().then((why) => {
                setBusy(false);
                setFailure(why);
              });
            }}
          >
            Save the draft and leave
          </Button>
          <Button onClick={onLeave}>Leave, throw it away</Button>
          <p role="alert" className="w-full font-semibold text-alarm empty:hidden">
            {failure}
          </p>
        </>
      }
    />
  );
}
