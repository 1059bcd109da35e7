import type { StatePoint } from '@/lib/schema/house-state';
import type { Preferences } from '@/lib/units/preferences';
import { backWords, qualityWords, UNSTEADY_WORDS } from '@/lib/wording/quality';

/** That a point was away is news for a day. */
const TOLD_MS = 86_400_000;
/** A report that came late is none. */
const SHORT_MS = 60_000;

const UNDER_VALUE = 'block font-sans text-[0.85rem] whitespace-normal sm:ml-auto sm:max-w-44';

/** Under a point's value: since when and why it is not trusted, or when it came back. */
export function PointDoubt({
  point,
  staleS,
  now,
  zone,
  preferences,
}: {
  point: StatePoint;
  /** Silent after so many seconds; null: as its inputs. */
  staleS: number | null;
  /** Epoch ms of app time. */
  now: number;
  zone: string;
  preferences: Preferences;
}) {
  const scene = { now, zone, preferences };
  const isOld = staleS !== null && point.at !== null && now - Date.parse(point.at) > staleS * 1000;
  const since = typeof point.doubtSince === 'string' ? Date.parse(point.doubtSince) : null;
  // the worker says so itself; where it stands still, its last word has grown old too
  const doubt = qualityWords(isOld ? { quality: 'bad', why: 'silent' } : { ...point, since }, scene);
  if (doubt !== null)
    return (
      <>
        <span className={`${UNDER_VALUE} text-warn`}>{doubt}</span>
        {point.why === 'unsteady' ? (
          <span className={`${UNDER_VALUE} text-soft`}>{UNSTEADY_WORDS}</span>
        ) : null}
      </>
    );
  if (!point.lastDoubt) return null;
  const last = {
    ...point.lastDoubt,
    from: Date.parse(point.lastDoubt.from),
    to: Date.parse(point.lastDoubt.to),
  };
  if (now - last.to >= TOLD_MS || last.to - last.from < SHORT_MS) return null;
  return <span className={`${UNDER_VALUE} text-soft`}>{backWords(last, scene)}</span>;
}
