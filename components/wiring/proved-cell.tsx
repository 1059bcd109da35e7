import Link from 'next/link';
import { buttonLook } from '@/components/ui/button-look';
import type { Channel } from '@/lib/schema/yard-view';
import type { Preferences } from '@/lib/units/preferences';
import { day } from '@/lib/units/time';
import { gainWords } from '@/lib/wording/proving';

export interface LastProof {
  by: string;
  gain: { kelvin: number; sd: number | null; seconds: number } | null;
}

/** When a channel was proved and what that showed, and the way to its proof. */
export function ProvedCell({
  channel,
  house,
  zone,
  proof,
  preferences,
}: {
  channel: Channel;
  house: string;
  zone: string;
  proof: LastProof | undefined;
  preferences: Preferences;
}) {
  const gain = proof?.gain ?? null;
  const words = gain === null ? null : gainWords(gain.kelvin, gain.sd, gain.seconds, preferences);
  return (
    <div className="flex flex-wrap items-center gap-x-2">
      {channel.provedAt === null ? (
        <span className="font-semibold text-warn">Not proved</span>
      ) : (
        <span>
          <span className="whitespace-nowrap">{day(Date.parse(channel.provedAt), zone)}</span>
          {words === null ? '' : `, ${words}`}
        </span>
      )}
      <Link
        href={`/${house}/wiring/prove/${channel.number}`}
        className={buttonLook(channel.provedAt === null ? 'plain' : 'quiet')}
      >
        <span>
          {channel.provedAt === null ? 'Prove' : 'Proof'}
          <span className="sr-only"> of the {channel.label}</span>…
        </span>
      </Link>
    </div>
  );
}
