import Link from 'next/link';
import type { Preferences } from '@/lib/units/preferences';
import { clock } from '@/lib/units/time';
import { decisionWords } from '@/lib/wording/duty';

export interface OpenedDecision {
  /** The channel's label, and its key. */
  channel: string;
  key: string;
  at: number;
  state: 'on' | 'off';
  claim: string;
}

/** Every decision of a night and what decided it. */
export function Decisions({
  house,
  decisions,
  from,
  zone,
  preferences,
  many,
}: {
  house: string;
  decisions: OpenedDecision[];
  /** The night's first noon: what stood then was decided before. */
  from: number;
  zone: string;
  preferences: Preferences;
  many: boolean;
}) {
  if (decisions.length === 0)
    return (
      <p className="text-soft">Nothing was decided in this night: no worker ran, or the channel is newer.</p>
    );
  return (
    <section>
      <h3 className="pb-1 font-semibold">What was decided, and why</h3>
      <ol
        className="max-h-80 overflow-y-auto border-t border-line print:max-h-none"
        tabIndex={0}
        aria-label="Decisions of the night"
      >
        {decisions.map((decision) => (
          <li
            key={`${decision.at} ${decision.channel} ${decision.claim} ${decision.state}`}
            className="flex gap-3 border-b border-faint py-1.5"
          >
            <time
              dateTime={new Date(decision.at).toISOString()}
              className="w-20 shrink-0 font-mono text-[0.95rem] text-soft"
            >
              {decision.at < from ? 'at noon' : clock(decision.at, zone, preferences)}
            </time>
            <Link
              href={`/${house}/watch?why=${decision.key}&at=${new Date(Math.max(decision.at, from)).toISOString()}`}
              className="underline decoration-line underline-offset-4 hover:decoration-ink"
            >
              {many ? `${decision.channel}: ` : null}
              {decisionWords(decision.state, decision.claim)}
              <span className="sr-only">: why</span>
            </Link>
          </li>
        ))}
      </ol>
    </section>
  );
}
