'use client';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import type { ButtonKind } from '@/components/ui/button-look';
import { workIn } from './work-in';

export function WorkInButton({ id, name, kind }: { id: string; name: string; kind?: ButtonKind }) {
  const [isBusy, setBusy] = useState(false);
  const [failure, setFailure] = useState('');
  return (
    <div className="flex flex-col items-start gap-2">
      <Button
        {...(kind === undefined ? {} : { kind })}
        busy={isBusy}
        onClick={() => {
          setBusy(true);
          void workIn(id).then((why) => {
            setFailure(why);
            setBusy(why === '');
          });
        }}
      >
        Go to {name}
      </Button>
      <p role="alert" className="font-semibold text-alarm empty:hidden">
        {failure}
      </p>
    </div>
  );
}
