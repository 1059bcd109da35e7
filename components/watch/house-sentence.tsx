'use client';
import { Sentence } from '@/components/ui/sentence';
import { becauseInstant } from '@/lib/wording/instants';
import { unknownSentence, watchSentence } from '@/lib/wording/watch';
import { useHouse } from './live-house';
import { standingOf } from './standing';

export function HouseSentence() {
  const house = useHouse();
  const { state, scene } = house;
  if (state === null) return <Sentence phrases={unknownSentence(house.house.name)} />;
  const now = becauseInstant(state.at) ?? scene.now;
  return <Sentence phrases={watchSentence(standingOf(house, state, now), scene)} />;
}
