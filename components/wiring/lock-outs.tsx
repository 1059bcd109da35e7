import { Age } from '@/components/ui/age';
import { Notice } from '@/components/ui/notice';
import { Panel } from '@/components/ui/panel';
import type { Preferences } from '@/lib/units/preferences';
import { moment } from '@/lib/units/time';
import type { Channel, Lockout } from '@/lib/schema/yard-view';
import { LOCKOUT_CAUTION } from '@/lib/wording/wiring-parts';
import { RemoveLockOutButton } from './remove-lock-out';

/** Standing lock-outs, large and above everything else of a page. */
export function StandingLockOuts({
  lockouts,
  channels,
  house,
  mayRemove,
}: {
  lockouts: Lockout[];
  channels: Pick<Channel, 'key' | 'label' | 'number'>[];
  house: string;
  mayRemove: boolean;
}) {
  const standing = lockouts.filter((one) => one.removedAt === null);
  return standing.map((one) => {
    const channel = channels.find((other) => other.key === one.channel);
    const label = channel?.label ?? one.channel;
    return (
      <Notice
        key={one.id}
        tone="warn"
        title={
          <span className="font-serif text-xl">
            Locked out: {label}
            {channel === undefined ? '' : `, channel ${channel.number}`}
          </span>
        }
        actions={mayRemove ? <RemoveLockOutButton house={house} id={one.id} label={label} /> : undefined}
      >
        <p className="text-base text-ink">“{one.why}”</p>
        <p>
          {one.by}, <Age at={Date.parse(one.at)} />. {LOCKOUT_CAUTION}
        </p>
        {mayRemove ? null : <p>An installer or an owner removes it.</p>}
      </Notice>
    );
  });
}

/** Lock-outs that were removed: who, when, why. */
export function FormerLockOuts({
  lockouts,
  channels,
  zone,
  now,
  preferences,
}: {
  lockouts: Lockout[];
  channels: Channel[];
  zone: string;
  now: number;
  preferences: Preferences;
}) {
  const former = lockouts.filter((one) => one.removedAt !== null).slice(0, 20);
  if (former.length === 0) return null;
  const when = (at: string) => moment(Date.parse(at), now, zone, preferences);
  return (
    <Panel title="Lock-outs before">
      <ul className="divide-y divide-line">
        {former.map((one) => (
          <li key={one.id} className="py-2 text-[0.95rem]">
            <strong>{channels.find((other) => other.key === one.channel)?.label ?? one.channel}</strong>, “
            {one.why}”
            <span className="block text-[0.85rem] text-soft">
              {one.by} from {when(one.at)}
              {one.removedAt === null
                ? ''
                : ` until ${when(one.removedAt)}, removed by ${one.removedBy ?? 'nobody known'}`}
            </span>
          </li>
        ))}
      </ul>
    </Panel>
  );
}
