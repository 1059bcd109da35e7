import { NoonToNoon } from '@/components/chart/noon-to-noon';
import { ButtonLink } from '@/components/ui/button';
import { Figures, Panel } from '@/components/ui/panel';
import type { NightSummary } from '@/lib/analysis/nights';
import type { WatchBand, WatchLine, WatchStrip } from '@/lib/schema/watch-view';
import type { Preferences } from '@/lib/units/preferences';
import { nightTitle } from '@/lib/wording/duty';
import { nightNotes } from '@/lib/wording/duty-notes';
import type { Scene } from '@/lib/wording/scene';
import { addressOf, type DutyAddress } from './address';
import { nightFigures, openedFigures } from '@/lib/wording/duty-figures';
import { Decisions, type OpenedDecision } from './opened-decisions';
import { Draws } from './opened-draws';
import { Happenings, type OpenedAlarm, type OpenedEntry } from './opened-happenings';

export interface OpenedData {
  summary: NightSummary;
  lines: WatchLine[];
  strips: WatchStrip[];
  bands: WatchBand[];
  decisions: OpenedDecision[];
  alarms: OpenedAlarm[];
  entries: OpenedEntry[];
  names: Pick<Scene, 'points' | 'channels' | 'sources'>;
}

/** One night whole: its lines and strips, its figures, each draw, every decision, what rang and what was done. */
export function OpenedNight({
  house,
  address,
  opened,
  nights,
  preferences,
}: {
  house: { slug: string; zone: string; frostLimit: number | null };
  address: DutyAddress;
  opened: OpenedData;
  /** Names of the nights in the table, ascending. */
  nights: string[];
  preferences: Preferences;
}) {
  const { summary, lines, strips, bands, names } = opened;
  const { zone, frostLimit } = house;
  const place = nights.indexOf(summary.night);
  const [before, after] = [nights[place - 1], place < 0 ? undefined : nights[place + 1]];
  const to = (night: string | undefined) => `${addressOf(house.slug, address, { night })}#night`;
  const own = new Set(summary.channels.map((channel) => channel.label));
  const main = bands.find((band) => band.purpose === 'warm' && own.has(band.channel)) ?? bands[0];
  const night = { from: summary.from, to: summary.ends };
  // an instant is told with its date where it is not of this night
  const scene: Scene = { ...names, now: summary.to, zone, preferences };
  return (
    <div id="night" className="scroll-mt-4">
      <Panel
        title={`The night of ${nightTitle(summary.night)}${summary.complete ? '' : ', so far'}`}
        actions={
          <span className="not-on-paper flex flex-wrap gap-2">
            {before === undefined ? null : <ButtonLink href={to(before)}>Night before</ButtonLink>}
            {after === undefined ? null : <ButtonLink href={to(after)}>Night after</ButtonLink>}
            <ButtonLink href={addressOf(house.slug, address, { night: undefined })}>Close</ButtonLink>
          </span>
        }
      >
        <div className="grid gap-x-8 gap-y-4 lg:grid-cols-[minmax(0,2fr)_minmax(0,1fr)]">
          <div className="flex min-w-0 flex-col gap-5">
            <NoonToNoon
              preferences={preferences}
              chart={{
                ...{ night, now: summary.to, zone, lines, strips, bands, frostLimit },
                main: main?.point ?? null,
              }}
            />
            <Draws draws={summary.draws} channels={summary.channels} zone={zone} preferences={preferences} />
          </div>
          <div className="flex min-w-0 flex-col gap-4">
            <Figures
              rows={[
                ...nightFigures([summary], zone, frostLimit, preferences),
                ...openedFigures(summary, zone, preferences),
              ]}
            />
            {nightNotes([summary]).map((note) => (
              <p key={note} className="text-[0.85rem] text-soft">
                {note}
              </p>
            ))}
            <Happenings alarms={opened.alarms} entries={opened.entries} scene={scene} />
            <Decisions
              house={house.slug}
              decisions={opened.decisions}
              from={summary.from}
              zone={zone}
              preferences={preferences}
              many={summary.channels.length > 1}
            />
          </div>
        </div>
      </Panel>
    </div>
  );
}
