'use client';
import { useAppNow } from '@/components/ui/clock';
import { Sentence } from '@/components/ui/sentence';
import { becauseInstant } from '@/lib/wording/instants';
import type { Phrase } from '@/lib/wording/phrase';
import { timeWords } from '@/lib/wording/scene';
import { unknownSentence, watchSentence } from '@/lib/wording/watch';
import { useHouse } from './live-house';
import { standingOf } from './standing';

export function HouseSentence() {
  const house = useHouse();
  const { state, scene } = house;
  const appNow = useAppNow(60_000);
  if (state === null) return <Sentence phrases={unknownSentence(house.house.name)} />;
  const now = becauseInstant(state.at) ?? scene.now;
  // words of the present would be untrue of a house that nobody has looked at since
  const asOf: Phrase[] = house.isStale
    ? [{ text: `At ${timeWords(now, { ...scene, now: appNow }) ?? ''}: `, tone: 'warn' }]
    : [];
  return <Sentence phrases={[...asOf, ...watchSentence(standingOf(house, state, now), scene)]} />;
}
