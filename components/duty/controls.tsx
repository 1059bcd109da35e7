import { ButtonLink } from '@/components/ui/button';
import type { NightSummary } from '@/lib/analysis/nights';
import { nightDate } from '@/lib/wording/duty';
import { addressOf, type DutyAddress, RANGES } from './address';
import { readAgainst } from './against';
import { brushOf } from './brush';
import { Choice } from './choice';
import { compareChoices, nightsWords } from './compare-choices';
import type { DutyHouse, DutyViewData } from './duty-data';
import { Overview } from './overview';
import { overviewTicks } from './overview-layout';
import { PrintButton } from './print-button';

/** Which source, which nights, beside what; the file and the print. */
export function Controls({
  house,
  address,
  source,
  data,
}: {
  house: DutyHouse;
  address: DutyAddress;
  source: { slug: string; name: string };
  data: DutyViewData;
}) {
  const { nights, chosen } = data;
  const own = { ...address, source: source.slug };
  const names = nights.map((night) => night.night);
  const isPart = chosen.length < nights.length;
  const against = address.against === undefined ? null : readAgainst(address.against);
  const hasHeat = nights.some((night) => night.heat !== null);
  return (
    <>
      <div className="not-on-paper flex flex-wrap items-end justify-between gap-3">
        <Choice
          key={JSON.stringify([own, nights.length])}
          house={house.slug}
          address={own}
          sources={data.sources}
          ranges={rangesOf(data)}
          others={compareChoices({
            ...{ house, source, address, places: data.places, all: names },
            chosen: chosen.map((night) => night.night),
          })}
        />
        <div className="flex flex-wrap gap-2">
          {/* a file, not a page: the browser must ask for it itself */}
          <ButtonLink href={csvOf(house.slug, source.slug, chosen)} prefetch={false} download>
            Download CSV
          </ButtonLink>
          <PrintButton />
        </div>
      </div>
      {nights.length < 3 ? null : (
        <Overview
          house={house.slug}
          address={own}
          nights={names}
          of={hasHeat ? 'kWh a night' : 'how long it ran a night'}
          heights={nights.map(({ heat, dutyOfNight }) => (hasHeat ? (heat?.kWh ?? null) : dutyOfNight))}
          ticks={overviewTicks(names)}
          chosen={isPart ? brushOf(names, chosen[0]?.night ?? '', chosen.at(-1)?.night ?? '') : null}
          other={against?.kind === 'nights' ? brushOf(names, against.from, against.to) : null}
        />
      )}
      {isPart ? (
        <p className="flex flex-wrap items-center gap-x-3 gap-y-1">
          <span>
            Chosen: {nightsWords(chosen)}, {chosen.length} of {nights.length}.
          </span>
          <ButtonLink
            kind="quiet"
            className="not-on-paper"
            href={addressOf(house.slug, own, { from: undefined, to: undefined })}
          >
            All nights
          </ButtonLink>
        </p>
      ) : null}
    </>
  );
}

/** The very nights of the table, from the interface. */
function csvOf(house: string, source: string, nights: readonly NightSummary[]): string {
  const query = new URLSearchParams({ format: 'csv', source, limit: '500' });
  const [first, last] = [nights[0], nights.at(-1)];
  if (first !== undefined) query.set('from', first.night);
  if (last !== undefined) query.set('to', last.night);
  return `/api/v1/houses/${house}/nights?${query}`;
}

/** Ranges that are longer than what is kept say the same as the first that holds it all, so they are left out. */
function rangesOf({ kept, nights }: DutyViewData): { nights: number; label: string }[] {
  const count = kept?.count ?? 0;
  const useful = RANGES.filter((range, i) => i === 0 || (RANGES[i - 1] ?? 0) < count);
  const span = (range: number) => {
    const first = nights[0];
    const last = nights.at(-1);
    const isShown = first !== undefined && last !== undefined && nights.length === Math.min(range, count);
    return isShown
      ? `${nightDate(first.night)} – ${nightDate(last.night)}, ${nights.length} nights`
      : `Last ${range} nights`;
  };
  return useful.map((range) => ({ nights: range, label: span(range) }));
}
