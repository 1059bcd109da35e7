import Link from 'next/link';
import type { Why } from '@/lib/schema/running';
import { becauseInstant } from '@/lib/wording/instants';
import { nextWords } from '@/lib/wording/next';
import { timeWords } from '@/lib/wording/scene';
import { followedWords, whySentence } from '@/lib/wording/why';
import { useHouse } from './live-house';
import { GapNow, GapsOver } from './why-gaps';
import { Ladder } from './why-ladder';

export function WhyBody({ why, at }: { why: Why; at: number | null }) {
  const house = useHouse();
  // of a moment that is past, times are told as they were read then
  const scene = at === null ? house.scene : { ...house.scene, now: at };
  const because = why.ladder.find((step) => step.speaks)?.because;
  const since = timeWords(becauseInstant(why.since), scene);
  const ended = timeWords(becauseInstant(why.ended?.at), scene);
  const foreseen = timeWords(becauseInstant(why.foreseenAt), scene);
  const next = nextWords(why.next, scene, why.state);
  return (
    <>
      <GapNow gaps={why.gaps} scene={scene} />
      <div aria-live="polite">
        {since === null ? null : (
          <p className="text-soft">{ended === null ? `Since ${since}` : `From ${since} to ${ended}`}</p>
        )}
        <p className="font-serif text-[1.35rem] leading-snug text-pretty">
          {whySentence(why.claim, because ?? {}, scene, at !== null)} {followedWords(why, scene)}
        </p>
      </div>
      <GapsOver gaps={why.gaps} scene={scene} isPast={at !== null} />
      {next.length === 0 ? null : (
        <section aria-label="What comes next">
          <h3 className="font-semibold">
            {at === null ? 'What comes next' : `What was to come, as seen at ${foreseen ?? ''}`}
          </h3>
          <ul className="mt-1 flex flex-col divide-y divide-faint border-y border-line text-[1.05rem]">
            {next.map((line) => (
              <li key={line} className="py-2">
                {line}
              </li>
            ))}
          </ul>
        </section>
      )}
      <Ladder ladder={why.ladder} under={why.under} scene={scene} />
      <p className="text-soft">
        <RuleOf why={why} slug={house.house.slug} />
      </p>
    </>
  );
}

function RuleOf({ why: { rule, version }, slug }: { why: Why; slug: string }) {
  if (rule === null)
    return version === null ? 'No rule had a part in it.' : `By version ${version} of its rule.`;
  return (
    <>
      By {version === null ? 'the rule' : `version ${version} of`}{' '}
      <Link
        href={`/${slug}/rules/${rule.slug}`}
        className="inline-flex min-h-11 items-center text-ink underline underline-offset-4"
      >
        {rule.name}
      </Link>
      .
    </>
  );
}
