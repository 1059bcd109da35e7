'use client';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { ConfirmDialog } from '@/components/ui/dialog';
import { TextField } from '@/components/ui/field';
import type { Proof } from '@/lib/schema/proof';
import { BIG } from './big';
import { useProving } from './context';
import { Steps } from './steps';

const isOpen = (state: string) => state === 'open' || state === 'failed';

/** The proof that goes on. It is kept as it stands: whoever leaves comes back to the same step. */
export function GoingProof({ proof, mayProve }: { proof: Proof; mayProve: boolean }) {
  const { act, busy, failure } = useProving();
  const isWhole = !proof.steps.some((one) => isOpen(one.state));
  return (
    <>
      <Steps proof={proof} mayProve={mayProve} />
      {mayProve && isWhole ? (
        <div className="border-t border-line pt-4">
          <Button kind="primary" className={BIG} busy={busy} onClick={() => void act('POST', 'finish')}>
            All is done: the channel is proved
          </Button>
          <p role="alert" className="mt-2 font-semibold text-alarm empty:hidden">
            {failure?.message}
          </p>
        </div>
      ) : null}
      {mayProve ? <GiveUp /> : null}
    </>
  );
}

function GiveUp() {
  const { act, busy, failure } = useProving();
  const [open, setOpen] = useState(false);
  const [why, setWhy] = useState('');
  return (
    <div className="mt-3">
      <Button kind="quiet" onClick={() => setOpen(true)}>
        Give this proof up…
      </Button>
      <ConfirmDialog
        open={open}
        onOpenChange={setOpen}
        title="Give this proof up?"
        description="What was done stays on record. The channel is not proved by it; the next proof begins with a dead circuit."
        confirm="Give it up"
        busy={busy}
        error={open ? failure?.message : undefined}
        onConfirm={() => {
          void act('POST', 'give-up', { why }).then((done) => {
            if (done) setOpen(false);
          });
        }}
      >
        <TextField label="Why" value={why} onChange={(event) => setWhy(event.target.value)} />
      </ConfirmDialog>
    </div>
  );
}

/** Nothing goes on: what a proof is, and the way into one. */
export function NoProof({ mayProve, ended }: { mayProve: boolean; ended: Proof | null }) {
  const { begin, busy, channel, failure } = useProving();
  return (
    <div className="flex flex-col gap-3">
      {ended?.outcome === 'proved' ? (
        <p role="status" className="text-[1.1rem] font-semibold">
          The channel is proved. ✓
        </p>
      ) : null}
      <p>
        A proof shows that this relay moves this load, the right way, and lets go of it by itself. It takes a
        quarter of an hour beside the panel, with a tester. You can leave it half done and come back.
      </p>
      {mayProve ? (
        <Button kind="primary" className={BIG} busy={busy} onClick={() => void begin(channel.key)}>
          {channel.provedAt === null && ended?.outcome !== 'proved' ? 'Begin to prove it' : 'Prove it anew'}
        </Button>
      ) : null}
      <p role="alert" className="font-semibold text-alarm empty:hidden">
        {failure?.message}
      </p>
    </div>
  );
}
