import type { Why } from '@/lib/schema/running';
import { figuresOf } from '@/lib/wording/because-figures';
import { ladderLines } from '@/lib/wording/ladder';
import type { Scene } from '@/lib/wording/scene';

/** Who spoke, with figures and thresholds; who kept still is folded away; who was overruled stands under the line. */
export function Ladder({ ladder, under, scene }: Pick<Why, 'ladder' | 'under'> & { scene: Scene }) {
  const lines = ladderLines(ladder, scene);
  const silent = lines.filter((line) => !line.speaks);
  const decider = lines.find((line) => line.decides);
  const figures = figuresOf(decider?.claim ?? '', ladder.find((step) => step.speaks)?.because, scene);
  return (
    <section aria-label="The ladder">
      <h3 className="font-semibold">What was asked, from the top</h3>
      {silent.length === 0 ? null : (
        <details className="border-t border-line">
          <summary className="flex min-h-11 cursor-pointer items-center text-soft underline underline-offset-4 hover:text-ink">
            {silent.length === 1
              ? 'One claim above it kept still'
              : `${silent.length} claims above it kept still`}
          </summary>
          <ol className="pb-2">
            {silent.map((line) => (
              <li key={line.claim} className="py-1 text-soft">
                <span className="text-ink">{line.title}.</span> {line.words}
              </li>
            ))}
          </ol>
        </details>
      )}
      <ol className="border-t border-line">
        {decider === undefined ? null : (
          <li className="-mx-2 my-1 rounded-md border-l-4 border-ember bg-faint p-3">
            <p className="text-lg font-semibold">
              {decider.title}
              <span className="font-normal text-soft"> decides</span>
            </p>
            {figures.length === 0 ? <p>{decider.words}</p> : <Figures figures={figures} />}
          </li>
        )}
        {ladderLines(under, scene).map((line, place) => (
          <li key={line.claim} className="border-b border-faint py-2">
            <p>
              <span className="font-semibold">{line.title}</span>
              <span className="text-soft">
                {' '}
                would turn it {under[place]?.wants ?? 'so'}, but is not asked
              </span>
            </p>
            <p className="text-soft">{line.words}</p>
          </li>
        ))}
      </ol>
    </section>
  );
}

function Figures({ figures }: { figures: ReturnType<typeof figuresOf> }) {
  return (
    <dl className="mt-1 grid grid-cols-[minmax(0,1fr)_auto] gap-x-4 gap-y-2">
      {figures.map(({ name, value, against }) => (
        <div key={name} className="contents">
          <dt>
            {name}
            {against === undefined ? null : <span className="block text-[0.95rem] text-soft">{against}</span>}
          </dt>
          <dd className="text-right font-mono text-lg">{value}</dd>
        </div>
      ))}
    </dl>
  );
}
