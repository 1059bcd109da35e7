'use client';
import { useState } from 'react';
import { useAppNow } from '@/components/ui/clock';
import { ConfirmDialog } from '@/components/ui/dialog';
import { send } from '@/components/ui/send';
import { say } from '@/components/ui/toast';
import { timeWords } from '@/lib/wording/scene';
import { useHouse } from './live-house';

const HOUR_MS = 3_600_000;

export function AllOffDialog({ onClose }: { onClose: () => void }) {
  const { house, channels, state, scene, look } = useHouse();
  const now = useAppNow(10_000);
  const [busy, setBusy] = useState(false);
  const [failure, setFailure] = useState<string | undefined>();
  const running = channels.filter((one) =>
    state?.channels.some((standing) => standing.key === one.key && standing.state === 'on'),
  );
  const helpers = channels.filter((one) => one.frostHelp).length;

  async function order() {
    setBusy(true);
    const answer = await send('POST', `/houses/${house.slug}/all-off`, {});
    setBusy(false);
    if (!answer.ok) return setFailure(answer.message);
    say('Everything is off by hand for an hour.');
    await look();
    onClose();
  }

  return (
    <ConfirmDialog
      open
      onOpenChange={(open) => (open ? undefined : onClose())}
      title={`Everything in the ${house.name.toLowerCase()} off?`}
      description={
        <>
          <p>
            All {channels.length} channels go off by hand till {timeWords(now + HOUR_MS, { ...scene, now })}
            {running.length === 0
              ? '; none of them runs now.'
              : `; ${running.map((one) => one.label).join(', ')} ${running.length === 1 ? 'stops' : 'stop'}.`}
          </p>
          {helpers === 0 ? null : (
            <p className="mt-1 font-semibold text-ink">
              Nothing helps against frost in that hour, even if the house falls under its limit. You are woken
              by an alarm then.
            </p>
          )}
          <p className="mt-1">
            Give each back with Auto before that if you like. To work at a load, use its isolator too.
          </p>
        </>
      }
      confirm="Everything off, 1 h"
      kind="alarm"
      busy={busy}
      error={failure}
      onConfirm={() => void order()}
    />
  );
}
