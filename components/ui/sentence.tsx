import type { Phrase, Tone } from '@/lib/wording/phrase';

export const TONES: Record<Tone, string> = {
  strong: 'font-semibold',
  house: 'font-semibold text-house',
  outdoors: 'text-outdoors',
  ember: 'text-ember',
  core: 'text-core',
  base: 'text-base-tone',
  soft: 'text-soft',
  warn: 'font-semibold text-warn',
  alarm: 'font-semibold text-alarm',
};

/** Phrases in the colour of their lines, with no element round them. */
export function Phrases({ phrases }: { phrases: readonly Phrase[] }) {
  return phrases.map((phrase, place) =>
    typeof phrase === 'string' ? (
      phrase
    ) : (
      <span key={place} className={TONES[phrase.tone]}>
        {phrase.text}
      </span>
    ),
  );
}

/** Opens a page: what a good head grower would say at the door. It is the page's heading. */
export function Sentence({ phrases, before }: { phrases: readonly Phrase[]; before?: string }) {
  return (
    <h1 className="max-w-[64ch] font-serif text-[1.4rem] leading-[1.38] text-pretty sm:text-[1.7rem]">
      {before === undefined ? null : <span className="sr-only">{before}: </span>}
      <Phrases phrases={phrases} />
    </h1>
  );
}
