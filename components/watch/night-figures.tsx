import Link from 'next/link';
import { Figures, Panel } from '@/components/ui/panel';
import { totalOf } from '@/lib/analysis/totals';
import type { NightSummary } from '@/lib/analysis/nights';
import type { WatchSource } from '@/lib/schema/watch-view';
import { count, energy, temperature, UNKNOWN } from '@/lib/units/format';
import type { Preferences } from '@/lib/units/preferences';
import { clock, duration } from '@/lib/units/time';
import { causeWords } from '@/lib/wording/quality';
import type { NightDoubt } from './standing';

/** This night so far, from the very rows that Duty shows; a figure that cannot be had says why. */
export function NightFigures({
  house,
  sources,
  nights,
  doubts,
  preferences,
}: {
  house: { slug: string; zone: string; frostLimit: number | null };
  sources: WatchSource[];
  nights: NightSummary[];
  /** Points that were in doubt this night and are good again. */
  doubts: NightDoubt[];
  preferences: Preferences;
}) {
  const nameOf = (slug: string) => sources.find((source) => source.slug === slug)?.name ?? slug;
  // heaters are duty too, but what is asked here is what the stores gave
  const drawn = nights.filter(
    (night) => sources.find((source) => source.slug === night.source)?.kind !== 'heater',
  );
  const total = totalOf(nights);
  const { lowest } = total;
  const under = nights.reduce((most, night) => Math.max(most, night.belowFrostLimitSeconds ?? 0), 0);
  const rows = [
    ...drawn.flatMap((night) => [
      {
        name: `Heat from ${nameOf(night.source)}`,
        value: night.heat === null ? UNKNOWN : heatWords(night.heat, night.onSeconds),
        ...(night.heat === null ? { note: NO_HEAT[night.missing.heat ?? ''] ?? '' } : {}),
      },
      {
        name: `${nameOf(night.source)} ran`,
        value: duration(night.onSeconds),
        note: count(night.starts, 'start'),
      },
    ]),
    {
      name: 'Electricity for it',
      value: total.electricity === null ? UNKNOWN : energy(total.electricity.kWh, 3),
    },
    {
      name: 'Lowest in the house',
      value:
        lowest === null
          ? UNKNOWN
          : `${temperature(lowest.value, preferences)}, ${clock(lowest.at, house.zone, preferences)}`,
    },
    ...(house.frostLimit === null
      ? []
      : [
          {
            name: `Under ${temperature(house.frostLimit, preferences)}`,
            value: lowest === null ? UNKNOWN : duration(under),
          },
        ]),
    ...doubts.map(({ name, why, from, to }) => ({
      name: `${name}: ${causeWords(why)}`,
      value: `${clock(from, house.zone, preferences)} to ${clock(to, house.zone, preferences)}`,
      note: 'good again',
    })),
  ];
  return (
    <Panel
      title="This night so far"
      note={
        <Link
          href={`/${house.slug}/duty`}
          className="inline-flex min-h-11 items-center underline underline-offset-4"
        >
          All nights
        </Link>
      }
    >
      {nights.length === 0 ? (
        <p className="border-t border-line py-3 text-soft">No source has done or said anything since noon.</p>
      ) : (
        <Figures rows={rows} />
      )}
    </Panel>
  );
}

/** Without a draw there is nothing to estimate; early in a night a tenth of a kWh would hide the figure in its rounding. */
function heatWords(heat: { kWh: number; sd: number }, onSeconds: number): string {
  return energy(heat.kWh, Math.abs(heat.kWh) < 1 ? 2 : 1, onSeconds === 0 ? null : heat.sd);
}

const NO_HEAT: Record<string, string> = {
  'no-channel': 'no channel draws on it',
  'no-loop': 'no loop is entered',
  'no-flow': 'no air flow is entered',
  'no-readings': 'the loop was not read',
};
