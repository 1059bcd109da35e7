'use client';
import { useId } from 'react';
import type { NightLayout } from '@/components/chart/night-layout';
import { NightSvg } from '@/components/chart/night-svg';
import type { RuleBody } from '@/lib/control/rule-body';
import type { Preferences } from '@/lib/units/preferences';
import type { DrawnNight } from './draw-night';
import { drawnBand } from './drawn-band';

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
  const withBand = (layout: NightLayout) => ({
    ...layout,
    bands: drawnBand(body, layout, night.sun, preferences),
  });
  return (
    <figure className="@container">
      <NightSvg id={`${id}w`} layout={withBand(night.wide)} className="hidden @[34rem]:block" />
      <NightSvg id={`${id}n`} layout={withBand(night.narrow)} className="@[34rem]:hidden" />
      <figcaption className="sr-only">{night.summary}</figcaption>
    </figure>
  );
}
