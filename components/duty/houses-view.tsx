import { ButtonLink } from '@/components/ui/button';
import { Sentence } from '@/components/ui/sentence';
import { Empty } from '@/components/ui/states';
import type { Preferences } from '@/lib/units/preferences';
import { housesSentence, worstOf } from '@/lib/wording/houses';
import { HousePanel } from './house-panel';
import type { HouseWeek } from './houses-data';

/** All houses of the holding, the worst first, each with what an owner asks once a week. */
export function HousesView({
  houses,
  ofHolding,
  now,
  preferences,
}: {
  houses: HouseWeek[];
  /** Open alarms that are no house's own. */
  ofHolding: number;
  now: number;
  preferences: Preferences;
}) {
  const ordered = worstOf(
    houses.map((house) => ({
      ...house,
      lastLowest: house.lastNight?.lowest?.value ?? null,
      fallingCores: house.sources.flatMap(({ name, core }) =>
        core?.trend?.isLastingFall === true ? [name] : [],
      ),
    })),
  );
  return (
    <div className="flex flex-col gap-4">
      <Sentence before="All houses" phrases={housesSentence(ordered, ofHolding, preferences)} />
      {ordered.length === 0 ? (
        <Empty title="No house yet." action={<ButtonLink href="/new-house">Add a house</ButtonLink>}>
          <p>A house has points, channels, sources and rules. It comes first.</p>
        </Empty>
      ) : (
        ordered.map((house) => (
          <HousePanel key={house.slug} house={house} now={now} preferences={preferences} />
        ))
      )}
    </div>
  );
}
