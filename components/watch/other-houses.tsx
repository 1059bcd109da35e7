import Link from 'next/link';
import { Panel } from '@/components/ui/panel';
import type { WatchCard } from '@/lib/schema/watch-view';
import { count, temperature } from '@/lib/units/format';
import type { Preferences } from '@/lib/units/preferences';
import { moment } from '@/lib/units/time';

/** Worst first: open alarms, then how near the frost limit. */
export function worstFirst(cards: readonly WatchCard[]): WatchCard[] {
  const room = (card: WatchCard) =>
    card.coldest === null ? -Infinity : card.coldest - (card.frostLimit ?? 0);
  return [...cards].sort((one, other) => other.alarms - one.alarms || room(one) - room(other));
}

export function OtherHouses({
  cards,
  now,
  preferences,
}: {
  cards: WatchCard[];
  now: number;
  preferences: Preferences;
}) {
  if (cards.length === 0) return null;
  return (
    <Panel title={cards.length === 1 ? 'The other house' : 'The other houses, worst first'}>
      <ul className="divide-y divide-line border-t border-line">
        {worstFirst(cards).map((card) => {
          const isCold = card.coldest !== null && card.frostLimit !== null && card.coldest < card.frostLimit;
          return (
            <li key={card.slug}>
              <Link
                href={`/${card.slug}/watch`}
                className="flex min-h-14 flex-wrap items-center justify-between gap-x-4 py-2 hover:bg-faint"
              >
                <span>
                  <span className="font-semibold underline underline-offset-4">{card.name}</span>
                  <span className="block text-[0.9rem] text-soft">
                    {card.isLaidUp
                      ? 'Laid up: nobody controls it'
                      : card.running.length === 0
                        ? 'Nothing runs'
                        : `${card.running.join(', ')} on`}
                    {card.at === null ? '' : `, ${moment(card.at, now, card.zone, preferences)}`}
                  </span>
                </span>
                <span className="text-right">
                  <span
                    className={`font-mono ${isCold ? 'font-semibold text-alarm' : card.coldest === null ? 'text-soft' : 'text-house'}`}
                  >
                    {temperature(card.coldest, preferences)}
                  </span>
                  {card.alarms === 0 ? null : (
                    <span className="block text-[0.9rem] font-semibold text-alarm">
                      {count(card.alarms, 'open alarm')}
                    </span>
                  )}
                </span>
              </Link>
            </li>
          );
        })}
      </ul>
    </Panel>
  );
}
