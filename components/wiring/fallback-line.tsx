import type { Channel, Point } from '@/lib/schema/yard-view';
import type { Preferences } from '@/lib/units/preferences';
import { moment } from '@/lib/units/time';
import { fallbackDoubt, fallbackWords, type CanFallback } from '@/lib/wording/alone';

export interface Alone {
  /** Whether a node can run fallbacks, by its key. */
  can: Record<string, CanFallback>;
  /** When a channel was last put on by its fallback, epoch ms by its id. */
  ran: Record<string, number>;
}

/** What a channel's field box does with it while nobody commands the box; nothing where no fallback was chosen. */
export function FallbackLine({
  channel,
  alone,
  points,
  zone,
  now,
  preferences,
}: {
  channel: Channel;
  alone: Alone;
  points: Point[];
  zone: string;
  now: number;
  preferences: Preferences;
}) {
  const { fallback } = channel;
  if (fallback === null) return null;
  const point = points.find((one) => one.key === fallback.point)?.name ?? fallback.point;
  const doubt = fallbackDoubt(alone.can[channel.node] ?? 'not-told', channel.node);
  const ranAt = alone.ran[channel.id];
  return (
    <span className="mt-1 block text-[0.85rem] font-normal text-soft">
      Without the server: {fallbackWords({ ...fallback, point }, preferences)}
      {doubt === null ? null : <span className="block text-warn">{doubt}</span>}
      {ranAt === undefined ? null : (
        <span className="block">Last ran so {moment(ranAt, now, zone, preferences)}.</span>
      )}
    </span>
  );
}
