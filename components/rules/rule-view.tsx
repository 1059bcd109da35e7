import Link from 'next/link';
import { NARROW, WIDE, type NightChart } from '@/components/chart/night-chart';
import { nightLayout } from '@/components/chart/night-layout';
import { compileTimeFacts, place } from '@/lib/control/calendar';
import type { HouseState } from '@/lib/schema/house-state';
import type { RuleWithVersions } from '@/lib/schema/rule-view';
import type { Channel, House, Point, Source } from '@/lib/schema/yard-view';
import type { Preferences } from '@/lib/units/preferences';
import { day } from '@/lib/units/time';
import { nightSummary } from '@/lib/wording/night-summary';
import type { DrawnNight } from './band-night';
import { RuleEditor } from './rule-editor';

export interface RuleData {
  house: House;
  rule: RuleWithVersions;
  others: string[];
  points: Point[];
  channels: Channel[];
  sources: Source[];
  state: HouseState | null;
  night: { name: string; from: number; to: number };
  readings: { point: string; at: number[]; value: number[] }[];
}

/** Draws the night on the server; the editor lays the band over it. Null where nothing was read in it. */
function drawNight(data: RuleData, now: number, preferences: Preferences): DrawnNight | null {
  const { house, rule, night, points } = data;
  const shown = new Set([
    rule.body.point,
    ...points.filter((one) => one.role === 'outdoors').map((one) => one.key),
  ]);
  const lines = data.readings
    .filter((one) => shown.has(one.point) && one.at.length > 0)
    .map((one) => {
      const point = points.find((other) => other.key === one.point);
      return {
        key: one.point,
        name: point?.name ?? one.point,
        role: point?.role ?? 'other',
        at: one.at,
        value: one.value,
      };
    });
  if (lines.length === 0) return null;
  const { from, to } = night;
  const chart: NightChart = {
    ...{ night: { from, to }, now, zone: house.zone, lines, strips: [], main: rule.body.point },
    frostLimit: house.frostLimit,
    // for the extent only: the editor draws the band itself
    bands: [
      {
        point: rule.body.point,
        channel: rule.channel,
        purpose: 'warm',
        periods: rule.body.band.map(({ low, high }) => ({ from, to, low, high })),
      },
    ],
  };
  const frame = (base: typeof WIDE) => ({ ...nightLayout(chart, base, preferences), bands: [] });
  return {
    title: `${day(from, house.zone)} to ${day(to, house.zone)}, noon to noon`,
    wide: frame(WIDE),
    narrow: frame(NARROW),
    summary: nightSummary(chart, preferences),
  };
}

/** The page of one rule. */
export function RuleView({
  data,
  allowed,
  preferences,
  now,
}: {
  data: RuleData;
  allowed: readonly string[];
  preferences: Preferences;
  now: number;
}) {
  const { house, rule, points, channels, sources, state } = data;
  const channel = channels.find((one) => one.key === rule.channel);
  const source = sources.find((one) => one.slug === channel?.source);
  const facts = compileTimeFacts(place(house))(now);
  return (
    <div className="flex flex-col gap-5">
      <nav aria-label="Where this is" className="-mb-3 text-[0.95rem] text-soft">
        <Link
          href={`/${house.slug}/rules`}
          className="inline-flex min-h-11 items-center underline underline-offset-4"
        >
          Rules
        </Link>{' '}
        / {rule.name}
        {rule.draft === null ? '' : ` / draft of version ${rule.draft.number}`}
      </nav>
      <RuleEditor
        data={{
          ...{ rule, points, preferences, now },
          pointStates: state?.points ?? [],
          names: {
            channel: { label: channel?.label ?? rule.channel, loadKind: channel?.load.kind ?? 'other' },
            points: points.map(({ key, name, role, unit }) => ({ key, name, role, unit })),
          },
          channel: {
            key: rule.channel,
            label: channel?.label ?? rule.channel,
            isProved: channel !== undefined && channel.provedAt !== null,
          },
          source:
            source === undefined
              ? null
              : {
                  name: source.name,
                  channels: channels.filter((one) => one.source === source.slug).length,
                  dailyLimitS: source.dailyLimit,
                  drawnTodayS: state?.sources.find((one) => one.slug === source.slug)?.drawnToday ?? null,
                },
          clock: {
            'time.hour': facts.hour,
            'time.month': facts.month,
            'time.weekday': facts.weekday,
            'time.sunUp': facts.sunUp,
          },
          night: drawNight(data, now, preferences),
          zone: house.zone,
          house: house.slug,
          retiring: {
            channelLabel: channel?.label ?? rule.channel,
            others: data.others,
            isInForce: rule.inForce !== null,
            frostHelp: channel?.frostHelp ?? false,
            runsWithoutCommand: channel?.contact === 'NC',
          },
          mayWrite: allowed.includes('rule.write'),
        }}
      />
    </div>
  );
}
