'use client';
import { useId } from 'react';
import type { DrawnBand } from '@/components/chart/night-bands';
import type { NightLayout } from '@/components/chart/night-layout';
import { NightSvg } from '@/components/chart/night-svg';
import type { RuleBody } from '@/lib/control/rule-body';
import { temperatureFigure } from '@/lib/units/format';
import type { Preferences } from '@/lib/units/preferences';
import type { DrawnNight } from './draw-night';

/** y of a temperature, from two of the axis's own ticks. */
function heightOf(layout: NightLayout): ((celsius: number) => number) | null {
  const [one, other] = [layout.degrees[0], layout.degrees.at(-1)];
  if (one === undefined || other === undefined || one.celsius === other.celsius) return null;
  const perK = (other.y - one.y) / (other.celsius - one.celsius);
  return (celsius) => Math.min(layout.yBottom, Math.max(layout.yTop, one.y + (celsius - one.celsius) * perK));
}

/** Minutes of the day at which a period begins; null for what the sun sets, which only the server reckons. */
function minutesOf(from: string): number | null {
  const match = /^(\d\d):(\d\d)$/.exec(from);
  return match ? Number(match[1]) * 60 + Number(match[2]) : null;
}

/** The band's pieces along a night that runs from noon to noon. */
function drawnBand(body: RuleBody, layout: NightLayout, preferences: Preferences): DrawnBand[] {
  const y = heightOf(layout);
  if (y === null) return [];
  const noon = 12 * 60;
  const begun = body.band
    .map((period) => ({ period, minutes: body.band.length === 1 ? 0 : minutesOf(period.from) }))
    .filter((one) => one.minutes !== null)
    .map((one) => ({ period: one.period, after: ((one.minutes ?? 0) - noon + 1440) % 1440 }))
    .sort((one, other) => one.after - other.after);
  const last = begun.at(-1);
  if (last === undefined) return [];
  // before the first period of the night the last one still holds
  const pieces = begun[0]?.after === 0 ? begun : [{ ...last, after: 0 }, ...begun];
  const [over, under] = body.purpose === 'warm' ? ['off above', 'on below'] : ['on above', 'off below'];
  const width = layout.x1 - layout.x0;
  return pieces.map((piece, place) => {
    const x = layout.x0 + (piece.after / 1440) * width;
    const right = layout.x0 + ((pieces[place + 1]?.after ?? 1440) / 1440) * width;
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

export function BandNight({
  night,
  body,
  preferences,
}: {
  night: DrawnNight;
  body: RuleBody;
  preferences: Preferences;
}) {
  const id = useId().replaceAll(/[^a-z0-9]/gi, '');
  const withBand = (layout: NightLayout) => ({ ...layout, bands: drawnBand(body, layout, preferences) });
  return (
    <figure className="@container">
      <NightSvg id={`${id}w`} layout={withBand(night.wide)} className="hidden @[34rem]:block" />
      <NightSvg id={`${id}n`} layout={withBand(night.narrow)} className="@[34rem]:hidden" />
      <figcaption className="sr-only">{night.summary}</figcaption>
    </figure>
  );
}
