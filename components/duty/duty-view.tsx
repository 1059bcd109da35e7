import { StripKey } from '@/components/chart/strip';
import { ButtonLink } from '@/components/ui/button';
import { Figures, Panel } from '@/components/ui/panel';
import { Sentence } from '@/components/ui/sentence';
import { Empty } from '@/components/ui/states';
import type { NightSummary } from '@/lib/analysis/nights';
import { totalOf } from '@/lib/analysis/totals';
import type { Preferences } from '@/lib/units/preferences';
import { dutySentence, nightDate } from '@/lib/wording/duty';
import { type DutyAddress, RANGES } from './address';
import { Choice } from './choice';
import { CoreAtDawn, dawnsOf } from './core-at-dawn';
import { nightFigures } from './figures';
import { SharedPatterns } from './night-strip';
import { NightsTable } from './nights-table';
import { OpenedNight, type OpenedDecision } from './opened-night';
import { PrintButton } from './print-button';

export interface DutyViewData {
  sources: { slug: string; name: string }[];
  source: { slug: string; name: string } | null;
  kept: { first: string; last: string; count: number } | null;
  nights: NightSummary[];
  marks: { at: number; kind: string }[];
  opened: { summary: NightSummary; decisions: OpenedDecision[] } | null;
}

export function DutyView({
  house,
  address,
  data,
  preferences,
}: {
  house: { slug: string; name: string; zone: string; frostLimit: number | null };
  address: DutyAddress;
  data: DutyViewData;
  preferences: Preferences;
}) {
  const { source, nights } = data;
  if (source === null) return <NoSource house={house} />;
  const totals = totalOf(nights);
  const standing = { source: source.name, nights, totals, frostLimitC: house.frostLimit };
  const shared = { house: house.slug, address, frostLimitC: house.frostLimit, preferences };
  const dawns = dawnsOf(nights);
  return (
    <div className="flex flex-col gap-4">
      <SharedPatterns />
      <Sentence phrases={dutySentence(standing, preferences)} before="Duty" />
      <div className="not-on-paper flex flex-wrap items-end justify-between gap-3">
        <Choice
          key={`${source.slug} ${address.nights}`}
          house={house.slug}
          address={{ ...address, source: source.slug }}
          sources={data.sources}
          ranges={rangesOf(data)}
        />
        <div className="flex flex-wrap gap-2">
          {/* a file, not a page: the browser must ask for it itself */}
          <ButtonLink href={csvOf(house.slug, source.slug, nights)} prefetch={false} download>
            Download CSV
          </ButtonLink>
          <PrintButton />
        </div>
      </div>
      {data.opened === null ? null : (
        <OpenedNight
          {...shared}
          {...data.opened}
          zone={house.zone}
          nights={nights.map((night) => night.night)}
        />
      )}
      {nights.length === 0 ? (
        <Empty title="No night yet.">
          <p>
            A night runs from noon to noon and is summed up from its first reading on. Connect a field node on
            Wiring and put a rule into force; this page then fills itself.
          </p>
        </Empty>
      ) : (
        <div className="grid gap-4 lg:grid-cols-[minmax(0,1fr)_20.5rem] lg:items-start print:block">
          <Panel title="Every night, noon to noon" note={<StripKey id="duty-key" />}>
            <NightsTable {...shared} nights={nights} totals={totals} />
          </Panel>
          <div className="flex flex-col gap-4">
            {dawns.length === 0 ? null : (
              <Panel title="Core at dawn">
                <CoreAtDawn dawns={dawns} marks={data.marks} zone={house.zone} preferences={preferences} />
              </Panel>
            )}
            <Panel title={nights.length === 1 ? 'This night' : 'Together'}>
              <Figures rows={nightFigures(nights, house.zone, house.frostLimit, preferences)} />
            </Panel>
          </div>
        </div>
      )}
    </div>
  );
}

/** The very nights of the table, from the interface. */
function csvOf(house: string, source: string, nights: readonly NightSummary[]): string {
  const query = new URLSearchParams({ format: 'csv', source, limit: '500' });
  const first = nights[0];
  if (first !== undefined) query.set('from', first.night);
  return `/api/v1/houses/${house}/nights?${query}`;
}

function NoSource({ house }: { house: { slug: string; name: string } }) {
  return (
    <div className="flex flex-col gap-4">
      <h1 className="sr-only">Duty of {house.name}</h1>
      <Empty
        title={`${house.name} has no source of heat yet.`}
        action={<ButtonLink href={`/${house.slug}/wiring`}>Go to Wiring</ButtonLink>}
      >
        <p>
          Duty compares nights of a heap, of ground tubes or of a heater. Enter the source and its channel on
          Wiring.
        </p>
      </Empty>
    </div>
  );
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
