import { NoonToNoon } from '@/components/chart/noon-to-noon';
import { StripKey } from '@/components/chart/strip';
import { ButtonLink } from '@/components/ui/button';
import { Panel } from '@/components/ui/panel';
import { Empty } from '@/components/ui/states';
import type { WatchView } from '@/lib/schema/watch-view';
import type { Preferences } from '@/lib/units/preferences';
import { Alarms } from './alarms';
import { AloneNotice } from './alone-notice';
import { Channels } from './channels';
import { HouseSentence } from './house-sentence';
import { LinkNotice } from './link-notice';
import { LiveHouseProvider } from './live-house';
import { NightFigures } from './night-figures';
import { OtherHouses } from './other-houses';
import { mainBand, pastDoubts } from './standing';
import { WhyChart } from './why-chart';
import { YardDrawing } from './yard-drawing';

/** How the house stands now: alarms, the sentence, the night, the yard, each load and why. */
export function Watch({
  view,
  preferences,
  allowed,
}: {
  view: WatchView;
  preferences: Preferences;
  allowed: string[];
}) {
  const { lines, strips, nights, alone, others, ...start } = view;
  const cold = nights.flatMap((night) => (night.outdoorsLowest === null ? [] : [night.outdoorsLowest]));
  const coldest = cold.reduce<(typeof cold)[number] | null>(
    (low, one) => (low === null || one.value < low.value ? one : low),
    null,
  );
  return (
    <LiveHouseProvider key={view.house.id} start={{ ...start, preferences, allowed, coldest }}>
      <div className="flex flex-col gap-5">
        <div className="flex flex-col gap-2 empty:hidden">
          <LinkNotice />
          <Alarms />
          <AloneNotice
            alone={alone}
            zone={view.house.zone}
            many={(view.state?.nodes.length ?? 0) > 1}
            preferences={preferences}
          />
        </div>
        <HouseSentence />
        {view.state === null ? (
          <NotYet slug={view.house.slug} hasChannels={view.channels.length > 0} />
        ) : null}
        <div className="grid items-start gap-5 xl:grid-cols-[minmax(0,13fr)_minmax(0,6fr)]">
          <div className="flex min-w-0 flex-col gap-5">
            <Panel title="Noon to noon" note={<StripKey id="key" />}>
              <WhyChart night={view.night} now={view.now}>
                <NoonToNoon
                  preferences={preferences}
                  chart={{
                    ...{
                      night: view.night,
                      now: view.now,
                      zone: view.house.zone,
                      frostLimit: view.house.frostLimit,
                    },
                    ...{ lines, strips, bands: view.bands, main: mainBand(view)?.point ?? null },
                  }}
                />
              </WhyChart>
            </Panel>
            <Channels />
          </div>
          <div className="grid min-w-0 items-start gap-5 sm:grid-cols-2 xl:grid-cols-1">
            <YardDrawing />
            <NightFigures
              house={view.house}
              sources={view.sources}
              nights={nights}
              doubts={pastDoubts(view.state, view.night.from)}
              preferences={preferences}
            />
            <OtherHouses cards={others} now={view.now} preferences={preferences} />
          </div>
        </div>
      </div>
    </LiveHouseProvider>
  );
}

/** Before the worker's first step for a house. */
function NotYet({ slug, hasChannels }: { slug: string; hasChannels: boolean }) {
  return (
    <Empty
      title={hasChannels ? 'Waiting for the first readings' : 'This house has no channels yet'}
      action={<ButtonLink href={`/${slug}/wiring`}>To the wiring</ButtonLink>}
    >
      {hasChannels
        ? 'Its node has not reported. Look that it has power and network, and that its address and token are right.'
        : 'Register its node, then its points, sources and channels. Rules come after that.'}
    </Empty>
  );
}
