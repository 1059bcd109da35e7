'use client';
import { Button } from '@/components/ui/button';
import { usePressed } from '@/components/ui/use-pressed';

// every page of every house carries this button's script, and few ever show it: its dialog comes when it is pressed
const fetchDialog = () => import('./remove-lock-out-dialog');

export function RemoveLockOutButton(props: { house: string; id: string; label: string }) {
  const { part, isOpen, setOpen, failure, press } = usePressed(fetchDialog);
  return (
    <>
      <Button {...press}>Remove the lock-out…</Button>
      <p role="alert" className="w-full font-semibold text-alarm empty:hidden">
        {failure}
      </p>
      {part === null ? null : <part.RemoveLockOutDialog {...props} open={isOpen} onOpenChange={setOpen} />}
    </>
  );
}
