/** What nose and hand tell of a heap: the words of the buttons, and what each means. */
import type { Smell, Squeeze } from '@/lib/analysis/heap-facts';

export interface Sense<Word extends string> {
  word: Word;
  label: string;
  means: string;
  /** What to do about it; empty where all is well. */
  then: string;
  isWell: boolean;
}

/** Common practice, no source. */
export const SMELL_WORDS: readonly Sense<Smell>[] = [
  { word: 'earthy', label: 'Earthy', means: 'It works as it should.', then: '', isWell: true },
  {
    word: 'ammonia',
    label: 'Ammonia',
    means: 'More nitrogen than carbon to bind it: nitrogen is leaving as gas.',
    then: 'More carbon: straw, dry leaves, chips.',
    isWell: false,
  },
  {
    word: 'rotten-egg',
    label: 'Rotten egg',
    means: 'No air in it: too wet or too dense.',
    then: 'Dry, coarse stuff in, and open it up on a mild day.',
    isWell: false,
  },
  {
    word: 'sour',
    label: 'Sour',
    means: 'It is turning airless: too much fresh, wet green.',
    then: 'Mix in dry, coarse stuff; wait with the next greens.',
    isWell: false,
  },
];

/** A fistful from a hand’s depth, squeezed hard. Common practice, no source; the shares are Cornell’s. */
export const SQUEEZE_WORDS: readonly Sense<Squeeze>[] = [
  {
    word: 'crumbles',
    label: 'Crumbles',
    means: 'Too dry: under some 40 % water it hardly works.',
    then: 'Water it slowly, along the dry side.',
    isWell: false,
  },
  {
    word: 'drops',
    label: 'A drop or two',
    means: 'Right: some 50 to 60 % water.',
    then: '',
    isWell: true,
  },
  {
    word: 'runs',
    label: 'Water runs',
    means: 'Too wet: over some 65 % water its pores are full.',
    then: 'Dry, coarse stuff in; see that the cover sheds rain.',
    isWell: false,
  },
];

export function sensed(smell: Smell | null, squeeze: Squeeze | null): string {
  const [nose, hand] = [
    SMELL_WORDS.find((one) => one.word === smell),
    SQUEEZE_WORDS.find((one) => one.word === squeeze),
  ];
  const parts = [
    nose === undefined
      ? null
      : `smells ${nose.word === 'rotten-egg' ? 'of rotten egg' : nose.word === 'ammonia' ? 'of ammonia' : nose.word}`,
    hand === undefined
      ? null
      : {
          crumbles: 'crumbles when squeezed',
          drops: 'gives a drop or two',
          runs: 'water runs when squeezed',
        }[hand.word],
  ].filter((part) => part !== null);
  const text = parts.join(', ');
  return text === '' ? '' : `${text.charAt(0).toUpperCase()}${text.slice(1)}.`;
}
