'use client';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { TextField } from '@/components/ui/field';
import { useProving } from './context';

/** For what cannot be done here: the reason is kept, and the proof goes on. */
export function Without({ step, word }: { step: 'photographs' | 'gain' | 'last-resort'; word: string }) {
  const { act, busy } = useProving();
  const [why, setWhy] = useState<string | null>(null);
  const [error, setError] = useState<string>();
  if (why === null)
    return (
      <Button kind="quiet" onClick={() => setWhy('')}>
        {word}…
      </Button>
    );
  return (
    <div className="flex flex-col gap-2">
      <TextField
        label="Why"
        value={why}
        error={error}
        onChange={(event) => {
          setWhy(event.target.value);
          setError(undefined);
        }}
      />
      <div className="flex flex-wrap gap-2">
        <Button
          busy={busy}
          onClick={() => {
            if (why.trim() === '') return setError('Say why in a few words: it stays in the record.');
            void act('POST', 'steps', { step, without: why });
          }}
        >
          {word}
        </Button>
        <Button kind="quiet" onClick={() => setWhy(null)}>
          Back
        </Button>
      </div>
    </div>
  );
}
