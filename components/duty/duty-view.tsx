import { StripKey } from '@/components/chart/strip';
import { ButtonLink } from '@/components/ui/button';
import { Panel } from '@/components/ui/panel';
import { Sentence } from '@/components/ui/sentence';
import { Empty } from '@/components/ui/states';
import { totalOf } from '@/lib/analysis/totals';
import type { Preferences } from '@/lib/units/preferences';
import { dutySentence } from '@/lib/wording/duty';
import { recoverySentence } from '@/lib/wording/duty-recovery';
import { sentences } from '@/lib/wording/join';
import type { DutyAddress } from './address';
import { Beside } from './beside';
import { Controls } from './controls';
import type { DutyHouse, DutyViewData } from './duty-data';
import { SharedPatterns } from './night-strip';
import { NightsTable } from './nights-table';
import { OpenedNight } from './opened-night';
import { SideColumn } from './side-column';
import { OutdoorsPanel } from './outdoors-panel';
import { Year } from './year';

export function DutyView({
  house,
  address,
  data,
  preferences,
}: {
  house: DutyHouse;
  address: DutyAddress;
  data: DutyViewData;
  preferences: Preferences;
}) {
  const { source, chosen, opened, recovery } = data;
  if (source === null) return <NoSource house={house} />;
  const totals = totalOf(chosen);
  const isPart = chosen.length < data.nights.length;
  const standing = { source: source.name, nights: chosen, totals, frostLimitC: house.frostLimit, isPart };
  const shared = { house, address, source, data, preferences };
  return (
    <div className="flex flex-col gap-4">
      <SharedPatterns />
      <Sentence
        phrases={sentences(
          dutySentence(standing, preferences),
          recovery === null ? [] : recoverySentence(recovery.weeks, recovery.trend, preferences),
        )}
        before="Duty"
      />
      <Controls {...shared} />
      {opened === null ? null : (
        <OpenedNight {...shared} opened={opened} nights={chosen.map((night) => night.night)} />
      )}
      {data.other === null ? null : <Beside {...shared} other={data.other} />}
      {chosen.length === 0 ? (
        <Empty title="No night yet.">
          <p>
            A night runs from noon to noon and is summed up from its first reading on. Connect a field node on
            Wiring and put a rule into force; this page then fills itself.
          </p>
        </Empty>
      ) : (
        <div className="grid gap-4 lg:grid-cols-[minmax(0,1fr)_20.5rem] lg:items-start print:block">
          <div className="flex min-w-0 flex-col gap-4">
            <Panel title="Every night, noon to noon" note={<StripKey id="duty-key" />}>
              <NightsTable
                house={house.slug}
                {...{ address, totals, preferences }}
                nights={chosen}
                frostLimitC={house.frostLimit}
              />
            </Panel>
            <OutdoorsPanel source={source.name} nights={chosen} preferences={preferences} />
            <Year {...shared} />
          </div>
          <SideColumn {...shared} />
        </div>
      )}
    </div>
  );
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
