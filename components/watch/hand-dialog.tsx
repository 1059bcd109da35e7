'use client';
import { useState } from 'react';
import { Checkbox } from '@/components/ui/check';
import { useAppNow } from '@/components/ui/clock';
import { ConfirmDialog } from '@/components/ui/dialog';
import { Select } from '@/components/ui/field';
import { send } from '@/components/ui/send';
import { say } from '@/components/ui/toast';
import { duration } from '@/lib/units/time';
import { handChoicesS, handWords } from '@/lib/wording/hand';
import type { HandChoice } from './channel-row';
import { useHouse } from './live-house';

/** Asks before a relay moves, and says what will happen; the words follow what is chosen. */
export function HandDialog({
  channelKey,
  choice,
  onClose,
}: {
  channelKey: string;
  choice: HandChoice;
  onClose: () => void;
}) {
  const house = useHouse();
  const now = useAppNow(10_000);
  const channel = house.channels.find((one) => one.key === channelKey);
  const choices = handChoicesS(channel?.loadKind ?? 'other', choice === 'on' ? 'on' : 'off');
  const inFrost = house.state?.channels.some((one) => one.claim === 'frost') ?? false;
  const [seconds, setSeconds] = useState(choices[0] ?? 1800);
  const [holdInFrost, setHoldInFrost] = useState(inFrost);
  const [busy, setBusy] = useState(false);
  const [failure, setFailure] = useState<string | undefined>();
  if (channel === undefined) return null;

  async function order() {
    setBusy(true);
    const path = `/houses/${house.house.slug}/channels/${channel?.number ?? 0}/hand`;
    const answer =
      choice === 'auto'
        ? await send('DELETE', path)
        : await send('POST', path, {
            state: choice,
            seconds,
            ...(choice === 'off' && holdInFrost ? { holdInFrost } : {}),
          });
    setBusy(false);
    if (!answer.ok) return setFailure([answer.message, ...Object.values(answer.fields)].join(' '));
    say(
      choice === 'auto'
        ? `${channel?.label ?? ''} is back to auto.`
        : `${channel?.label ?? ''} is ${choice} by hand.`,
    );
    await house.look();
    onClose();
  }

  const source = house.sources.find((one) => one.slug === channel.source);
  const isUnderFloor = house.state?.sources.find((one) => one.slug === channel.source)?.underFloor === true;
  const ask = {
    ...{
      channel,
      seconds,
      holdInFrost,
      inFrost,
      state: choice === 'on' ? ('on' as const) : ('off' as const),
    },
    frostLimit: house.house.frostLimit,
    coreUnderFloor:
      isUnderFloor && source !== undefined && source.coreFloor !== null
        ? {
            floor: source.coreFloor,
            value: house.state?.points.find((one) => one.key === source.core)?.value ?? null,
          }
        : null,
  };
  const words =
    choice === 'auto'
      ? ['Its rule, its rest and the ladder of claims decide again, at once.']
      : handWords(ask, { ...house.scene, now });
  const verb = { on: 'by hand', off: 'off by hand', auto: 'back to auto' }[choice];
  return (
    <ConfirmDialog
      open
      onOpenChange={(open) => (open ? undefined : onClose())}
      title={`${channel.label}: ${verb}`}
      description={words.map((line) => (
        <p key={line} className="mt-1">
          {line}
        </p>
      ))}
      confirm={choice === 'auto' ? 'Give it back' : `Turn ${choice} for ${duration(seconds)}`}
      kind={ask.coreUnderFloor !== null && choice === 'on' ? 'alarm' : 'primary'}
      busy={busy}
      error={failure}
      onConfirm={() => void order()}
    >
      {choice === 'auto' ? undefined : (
        <>
          <Select
            label="For how long"
            value={seconds}
            onChange={(event) => setSeconds(Number(event.target.value))}
          >
            {[...choices]
              .sort((one, other) => one - other)
              .map((one) => (
                <option key={one} value={one}>
                  {duration(one)}
                </option>
              ))}
          </Select>
          {choice === 'off' && channel.frostHelp ? (
            <Checkbox
              label="Keep it off even in frost"
              hint={
                inFrost
                  ? 'There is frost now: without this it would not stay off.'
                  : 'For work at it, use a lock-out and its isolator instead.'
              }
              checked={holdInFrost}
              onChange={(event) => setHoldInFrost(event.target.checked)}
            />
          ) : null}
        </>
      )}
    </ConfirmDialog>
  );
}
