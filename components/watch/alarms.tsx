'use client';
import Link from 'next/link';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { Notice } from '@/components/ui/notice';
import { send } from '@/components/ui/send';
import { say } from '@/components/ui/toast';
import type { WatchAlarm } from '@/lib/schema/watch-view';
import { alarmWords, byGravity } from '@/lib/wording/alarm';
import { timeWords } from '@/lib/wording/scene';
import { useHouse } from './live-house';

const MOST = 4;

/** Open alarms above everything else, the gravest first, each with its two actions. */
export function Alarms() {
  const { alarms, house, controlRuns } = useHouse();
  // the notice above says it already, with more
  const open = byGravity(alarms).filter(
    (alarm) => alarm.kind !== 'control-not-running' || controlRuns !== false,
  );
  // those that somebody has taken on no longer shout
  const loud = open.filter((alarm) => alarm.acknowledgedAt === null);
  const quiet = open.filter((alarm) => alarm.acknowledgedAt !== null);
  const shown = [...loud, ...quiet].slice(0, MOST);
  return (
    <section aria-label="Open alarms" aria-live="assertive" className="flex flex-col gap-2 empty:hidden">
      {shown.map((alarm) => (
        <AlarmNotice key={alarm.id} alarm={alarm} />
      ))}
      {open.length > shown.length ? (
        <Link
          href={`/${house.slug}/alarms`}
          className="flex min-h-11 items-center underline underline-offset-4"
        >
          {open.length - shown.length} more open
        </Link>
      ) : null}
    </section>
  );
}

function AlarmNotice({ alarm }: { alarm: WatchAlarm }) {
  const { scene, allowed, look } = useHouse();
  const [busy, setBusy] = useState(false);
  const [failure, setFailure] = useState<string | null>(null);
  const words = alarmWords(alarm, scene);
  const taken = alarm.acknowledgedAt !== null;

  async function take() {
    setBusy(true);
    const answer = await send('POST', `/alarms/${alarm.id}/acknowledge`, {});
    setBusy(false);
    setFailure(answer.ok ? null : answer.message);
    if (!answer.ok) return;
    say('You have it. The others see that.');
    await look();
  }

  return (
    <Notice
      tone={taken ? 'quiet' : words.level}
      title={words.title}
      actions={
        taken || !allowed.includes('alarm.answer') ? undefined : (
          <>
            <Button kind="primary" busy={busy} onClick={() => void take()}>
              I’ve got it
            </Button>
            {alarm.kind === 'frost' ? <HeaterOn /> : null}
          </>
        )
      }
    >
      {taken ? (
        <p>
          {alarm.acknowledgedBy} has it since {timeWords(alarm.acknowledgedAt, scene)}. {words.effect}
        </p>
      ) : (
        <p>
          {words.effect} {words.remedy} Since {timeWords(alarm.raisedAt, scene)}.
        </p>
      )}
      <p role="alert" className="font-semibold text-alarm empty:hidden">
        {failure}
      </p>
    </Notice>
  );
}

/** The last resort, one press away: the house's heater by hand for an hour. */
function HeaterOn() {
  const { channels, state, house, allowed, look } = useHouse();
  const [busy, setBusy] = useState(false);
  const [failure, setFailure] = useState<string | null>(null);
  const heater = channels.find((one) => one.loadKind === 'heater');
  const standing = state?.channels.find((one) => one.key === heater?.key);
  if (heater === undefined || standing === undefined || standing.state === 'on' || standing.lockedOut)
    return null;
  if (!allowed.includes('channel.hand')) return null;

  async function turnOn() {
    setBusy(true);
    const answer = await send('POST', `/houses/${house.slug}/channels/${heater?.number ?? 0}/hand`, {
      state: 'on',
      seconds: 3600,
    });
    setBusy(false);
    setFailure(answer.ok ? null : answer.message);
    if (!answer.ok) return;
    say(`${heater?.label ?? ''} is on by hand for an hour.`);
    await look();
  }

  return (
    <>
      <Button busy={busy} onClick={() => void turnOn()}>
        {heater.label} on, 1 h
      </Button>
      <p role="alert" className="w-full font-semibold text-alarm empty:hidden">
        {failure}
      </p>
    </>
  );
}
