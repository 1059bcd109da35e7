'use client';
import { useQuery } from '@tanstack/react-query';
import Link from 'next/link';
import { Dialog } from '@/components/ui/dialog';
import { Skeleton } from '@/components/ui/states';
import { becauseWords } from '@/lib/wording/because';
import { stateWord } from '@/lib/wording/channel-state';
import { becauseInstant } from '@/lib/wording/instants';
import { ladderLines, type LadderLine, type Step } from '@/lib/wording/ladder';
import { nextWords } from '@/lib/wording/next';
import { timeWords } from '@/lib/wording/scene';
import { useHouse } from './live-house';

interface Why {
  at: string;
  state: 'on' | 'off';
  claim: string;
  ladder: Step[];
  next: unknown[];
  version: number | null;
}

/** The ladder that decided, from the top to the claim that spoke, and what would come next. */
export function WhySheet({ channelKey, onClose }: { channelKey: string; onClose: () => void }) {
  const { channels, state, house, scene } = useHouse();
  const channel = channels.find((one) => one.key === channelKey);
  const standing = state?.channels.find((one) => one.key === channelKey);
  const { data, isError } = useQuery<Why>({
    // the claim is part of the key: another decision is another question
    queryKey: ['why', house.slug, channelKey, standing?.claim, standing?.state],
    queryFn: async () => {
      const response = await fetch(`/api/v1/houses/${house.slug}/channels/${channel?.number ?? 0}/why`);
      if (!response.ok) throw new Error(`why answered ${response.status}`);
      return (await response.json()) as Why;
    },
  });
  if (channel === undefined || standing === undefined) return null;
  const next = data === undefined ? [] : nextWords(data.next, scene);
  return (
    <Dialog
      open
      as="sheet"
      onOpenChange={(open) => (open ? undefined : onClose())}
      title={`Why ${channel.label} is ${stateWord(standing, channel.loadKind).toLowerCase()}`}
      description={becauseWords(standing.claim, standing.because, scene)}
    >
      {isError ? (
        <p role="alert" className="font-semibold text-alarm">
          The reasons could not be fetched. The channel stands as shown; close this and try again.
        </p>
      ) : data === undefined ? (
        <Skeleton className="h-72" />
      ) : (
        <>
          <section aria-label="What comes next">
            <h3 className="font-semibold">What comes next</h3>
            {next.length === 0 ? (
              <p className="text-soft">Nothing by the clock; the next reading may change it.</p>
            ) : (
              <ul className="list-disc pl-5">
                {next.map((line) => (
                  <li key={line}>{line}</li>
                ))}
              </ul>
            )}
          </section>
          <section aria-label="The ladder">
            <h3 className="font-semibold">What was asked, from the top</h3>
            <p className="mb-2 text-[0.9rem] text-soft">The first that speaks decides.</p>
            <Ladder lines={ladderLines(data.ladder, scene)} />
          </section>
          <p className="text-[0.9rem] text-soft">
            {data.version === null ? 'No rule in force.' : `By version ${data.version} of its rule.`} As of{' '}
            {timeWords(becauseInstant(data.at), scene)}.{' '}
            <Link href={`/${house.slug}/rules`} className="underline underline-offset-4">
              To the rules
            </Link>
          </p>
        </>
      )}
    </Dialog>
  );
}

function Ladder({ lines }: { lines: LadderLine[] }) {
  return (
    <ol className="border-y border-line">
      {lines.map((line) =>
        line.decides ? (
          <li key={line.claim} className="-mx-2 rounded-md border-l-4 border-ember bg-faint p-2">
            <span className="font-semibold">{line.title}</span>
            <span className="sr-only"> decides</span>
            <span className="block">{line.words}</span>
          </li>
        ) : (
          <li key={line.claim} className="py-1 text-[0.9rem] text-soft">
            <span className="text-ink">{line.title}.</span> {line.words}
          </li>
        ),
      )}
    </ol>
  );
}
