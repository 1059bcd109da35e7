import { ButtonLink } from '@/components/ui/button';
import { Sentence } from '@/components/ui/sentence';
import { Empty } from '@/components/ui/states';

/** Stands where Watch would, for a house that is laid up: of now nothing can be told, only of what was. */
export function NothingToWatch({ house }: { house: { slug: string; name: string } }) {
  return (
    <div className="flex flex-col gap-5">
      <Sentence
        before="Watch"
        phrases={[
          'There is nothing to watch in ',
          { text: house.name, tone: 'strong' },
          ' until it is in service.',
        ]}
      />
      <Empty
        title="What it did is kept"
        action={
          <>
            <ButtonLink href={`/${house.slug}/duty`}>Its nights</ButtonLink>
            <ButtonLink href={`/${house.slug}/heap-book`}>Its heap book</ButtonLink>
            <ButtonLink href={`/${house.slug}/wiring`}>Its wiring</ButtonLink>
          </>
        }
      >
        Before it is put in service, go through wiring and rules, and give each field node a new token.
      </Empty>
    </div>
  );
}
