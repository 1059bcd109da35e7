'use client';
import { Button } from '@/components/ui/button';
import { usePressed } from '@/components/ui/use-pressed';

// every page of every house carries this button's script, and few ever show it: its dialog comes when it is pressed
const fetchDialog = () => import('./in-service-dialog');

export function InServiceButton({ house }: { house: { slug: string; name: string } }) {
  const { part, isOpen, setOpen, failure, press } = usePressed(fetchDialog);
  return (
    <>
      <Button {...press}>Put it in service</Button>
      <p role="alert" className="w-full font-semibold text-alarm empty:hidden">
        {failure}
      </p>
      {part === null || !isOpen ? null : <part.default house={house} onClose={() => setOpen(false)} />}
    </>
  );
}
