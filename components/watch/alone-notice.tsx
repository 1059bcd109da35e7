import { Notice } from '@/components/ui/notice';
import { Phrases } from '@/components/ui/sentence';
import type { Alone } from '@/lib/analysis/alone';
import type { Preferences } from '@/lib/units/preferences';
import { aloneSentence } from '@/lib/wording/alone';

/** Beyond these a link that comes and goes would push the house out of sight. */
const SHOWN = 3;

/** What the field boxes did by themselves this night, the latest first. */
export function AloneNotice({
  alone,
  zone,
  many,
  preferences,
}: {
  alone: Alone[];
  zone: string;
  /** This house has several field boxes. */
  many: boolean;
  preferences: Preferences;
}) {
  const [last, ...before] = alone.slice(-SHOWN).reverse();
  if (last === undefined) return null;
  const more = alone.length - 1 - before.length;
  return (
    <Notice tone="quiet" title={<Phrases phrases={aloneSentence(last, zone, preferences, many)} />}>
      {before.map((one) => (
        <p key={`${one.node} ${one.from}`}>
          <Phrases phrases={aloneSentence(one, zone, preferences, many)} />
        </p>
      ))}
      {more === 0 ? null : <p>{more === 1 ? 'Once more' : `${more} times more`} this night before that.</p>}
    </Notice>
  );
}
