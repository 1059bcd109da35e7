'use client';
import { useQuery } from '@tanstack/react-query';
import { Dialog } from '@/components/ui/dialog';
import { Skeleton } from '@/components/ui/states';
import type { Why } from '@/lib/schema/running';
import { whyTitle } from '@/lib/wording/why';
import { useHouse } from './live-house';
import { showWhy } from './why-address';
import { WhyBody } from './why-body';
import { WhyTime } from './why-time';

/** Nothing was decided for this channel so early. */
class TooEarly extends Error {}

async function askWhy(path: string): Promise<Why> {
  const response = await fetch(`/api/v1${path}`);
  if (response.status === 404) throw new TooEarly();
  if (!response.ok) throw new Error(`why answered ${response.status}`);
  return (await response.json()) as Why;
}

/** Why a load is, or was, as it is: the reason, what comes next, the whole ladder, and any other moment. */
export function WhySheet({ channelKey, at }: { channelKey: string; at: number | null }) {
  const { channels, state, house, scene } = useHouse();
  const channel = channels.find((one) => one.key === channelKey);
  const standing = state?.channels.find((one) => one.key === channelKey);
  const number = channel?.number ?? 0;
  const moment = at === null ? '' : `?at=${encodeURIComponent(new Date(at).toISOString())}`;
  const { data, error, isFetching } = useQuery<Why>({
    // of now, the claim is part of the key: another decision is another question
    queryKey: ['why', house.slug, channelKey, ...(at === null ? [standing?.claim, standing?.state] : [at])],
    queryFn: () => askWhy(`/houses/${house.slug}/channels/${number}/why${moment}`),
    // another moment is shown in the place of the one before, which does not blink away meanwhile
    placeholderData: (before) => before,
  });
  if (channel === undefined) return null;
  const told = data ?? (at === null ? standing : undefined);
  return (
    <Dialog
      open
      as="sheet"
      onOpenChange={(open) => (open ? undefined : showWhy(null, 'replace'))}
      title={
        told === undefined || error !== null
          ? `Why: ${channel.label}`
          : whyTitle({ channel, state: told.state, claim: told.claim, at }, scene)
      }
    >
      <div className="flex flex-col gap-5" aria-busy={isFetching}>
        {error instanceof TooEarly ? (
          <p className="text-lg">Nothing is known of that time: this channel was first decided later.</p>
        ) : error !== null ? (
          <p role="alert" className="font-semibold text-alarm">
            The reasons could not be fetched. The channel stands as shown; close this and try again.
          </p>
        ) : data === undefined ? (
          <Skeleton className="h-72" />
        ) : (
          <WhyBody why={data} at={at} />
        )}
        <WhyTime
          key={at ?? 'now'}
          at={at}
          earlier={data?.earlier ?? null}
          later={data?.later ?? null}
          onAsk={(moment_) => showWhy({ channel: channelKey, at: moment_ }, 'replace')}
        />
      </div>
    </Dialog>
  );
}
