/** The band of a rule laid over a night, as it is typed. */
import type { DrawnBand } from '@/components/chart/night-bands';
import type { NightLayout } from '@/components/chart/night-layout';
import type { RuleBody } from '@/lib/control/rule-body';
import { temperatureFigure } from '@/lib/units/format';
import type { Preferences } from '@/lib/units/preferences';
import { dayMark } from '@/lib/wording/rule-when';

/** What the sun does on a night, minutes after its first noon; null under a midnight sun or in a polar night. */
export interface NightSun {
  sunset: number | null;
  sunrise: number | null;
}

const DAY = 1440;
const NOON = 720;

/** y of a temperature, from two of the axis's own ticks. */
function heightOf(layout: NightLayout): ((celsius: number) => number) | null {
  const [one, other] = [layout.degrees[0], layout.degrees.at(-1)];
  if (one === undefined || other === undefined || one.celsius === other.celsius) return null;
  const perK = (other.y - one.y) / (other.celsius - one.celsius);
  return (celsius) => Math.min(layout.yBottom, Math.max(layout.yTop, one.y + (celsius - one.celsius) * perK));
}

/** Minutes after the night's noon at which a period begins; null where the sun does not do that on this night. */
function minutesAfterNoon(from: string, sun: NightSun): number | null {
  const mark = dayMark(from);
  if (mark === null) return null;
  if (mark.at === 'clock') {
    const minutes = Number(mark.time.slice(0, 2)) * 60 + Number(mark.time.slice(3));
    return (minutes + NOON) % DAY;
  }
  const does = sun[mark.at];
  return does === null ? null : (does + mark.offsetMin + DAY) % DAY;
}

/** The band's pieces along a night that runs from noon to noon. */
export function drawnBand(
  body: RuleBody,
  layout: NightLayout,
  sun: NightSun,
  preferences: Preferences,
): DrawnBand[] {
  const y = heightOf(layout);
  if (y === null) return [];
  const begun = body.band
    .flatMap((period) => {
      const after = body.band.length === 1 ? 0 : minutesAfterNoon(period.from, sun);
      return after === null ? [] : [{ period, after }];
    })
    .sort((one, other) => one.after - other.after);
  const last = begun.at(-1);
  if (last === undefined) return [];
  // before the first period of the night the last one still holds
  const pieces = begun[0]?.after === 0 ? begun : [{ ...last, after: 0 }, ...begun];
  const [over, under] = body.purpose === 'warm' ? ['off above', 'on below'] : ['on above', 'off below'];
  const width = layout.x1 - layout.x0;
  return pieces.map((piece, place) => {
    const x = layout.x0 + (piece.after / DAY) * width;
    const right = layout.x0 + ((pieces[place + 1]?.after ?? DAY) / DAY) * width;
    const [top, bottom] = [y(piece.period.high), y(piece.period.low)];
    const roomy = right - x > 96 && (place === 0 || piece.period !== pieces[place - 1]?.period);
    return {
      key: `${place}`,
      isMain: true,
      ...{ x, y: top, width: right - x, height: bottom - top },
      labels: roomy
        ? [
            { x: x + 5, y: top - 4, text: `${over} ${temperatureFigure(piece.period.high, preferences)}` },
            {
              x: x + 5,
              y: bottom + 12,
              text: `${under} ${temperatureFigure(piece.period.low, preferences)}`,
            },
          ]
        : [],
    };
  });
}
