import { Panel } from '@/components/ui/panel';
import { heatLine, heatNights } from '@/lib/analysis/heat-outdoors';
import type { NightSummary } from '@/lib/analysis/nights';
import { fahrenheit } from '@/lib/units/conversion';
import { degrees } from '@/lib/units/format';
import type { Preferences } from '@/lib/units/preferences';
import { outdoorsWords } from '@/lib/wording/duty-outdoors';
import { midSentence } from '@/lib/wording/rule-names';
import { HeatOutdoors } from './heat-outdoors';

/** Heat a night against the lowest outdoors, with a line where the nights bear one. */
export function OutdoorsPanel({
  source,
  nights,
  preferences,
}: {
  source: string;
  nights: readonly NightSummary[];
  preferences: Preferences;
}) {
  const known = heatNights(nights);
  const line = heatLine(known);
  const said = outdoorsWords(line, known, midSentence(source), preferences);
  const degreesOf = (celsius: number) => (preferences.temperature === 'F' ? fahrenheit(celsius) : celsius);
  return (
    <Panel title="Heat against outdoors">
      <p className="text-[0.9rem] text-soft">kWh a night, by the lowest outdoors</p>
      {known.length === 0 ? null : (
        <HeatOutdoors
          said={said}
          unit={degrees(preferences)}
          nights={known.map(({ outdoors, kWh, sd }) => [hundredth(degreesOf(outdoors)), kWh, sd])}
          curve={
            'why' in line ? [] : line.curve.map((one) => ({ ...one, outdoors: degreesOf(one.outdoors) }))
          }
        />
      )}
      <p className="pt-1 text-[0.9rem]">{said}</p>
    </Panel>
  );
}

/** As near as a dot can be drawn. */
const hundredth = (value: number) => Math.round(value * 100) / 100;
