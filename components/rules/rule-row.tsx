import Link from 'next/link';
import { Phrases } from '@/components/ui/sentence';
import type { HouseState } from '@/lib/schema/house-state';
import type { Rule } from '@/lib/schema/rule-view';
import type { Channel, House, Point, Source } from '@/lib/schema/yard-view';
import { temperatureFigure } from '@/lib/units/format';
import type { Preferences } from '@/lib/units/preferences';
import { day } from '@/lib/units/time';
import { bandWords, restSentence, ruleHeadline } from '@/lib/wording/rule';
import { whenWords } from '@/lib/wording/rule-when';

export interface RulesData {
  house: House;
  rules: Rule[];
  retired: Rule[];
  points: Point[];
  channels: Channel[];
  sources: Source[];
  state: HouseState | null;
  /** False: nobody steps the house, so its state is what was last seen. */
  controlRuns: boolean;
}

/** The band on a short scale of the whole house's bands, with where its point stands now. */
function BandMark({
  low,
  high,
  now,
  extent,
}: {
  low: number;
  high: number;
  now: number | null;
  extent: [number, number];
}) {
  const x = (celsius: number) => ((celsius - extent[0]) / (extent[1] - extent[0])) * 120;
  return (
    <svg aria-hidden="true" viewBox="0 0 120 18" className="h-4.5 w-30">
      <line x1="0" x2="120" y1="9" y2="9" className="stroke-line" strokeWidth="2" />
      <rect x={x(low)} y="5" width={Math.max(2, x(high) - x(low))} height="8" rx="2" className="fill-house" />
      {now === null ? null : (
        <path d={`M${Math.min(118, Math.max(2, x(now)))} 1v16`} className="stroke-ink" strokeWidth="2" />
      )}
    </svg>
  );
}

/** One rule of the list: its sentence, its band with where the point stands, its versions. */
export function RuleRow({
  rule,
  data,
  preferences,
  extent,
}: {
  rule: Rule;
  data: RulesData;
  preferences: Preferences;
  extent: [number, number];
}) {
  const { house, points, channels, state, controlRuns } = data;
  const channel = channels.find((one) => one.key === rule.channel);
  const names = {
    channel: { label: channel?.label ?? rule.channel, loadKind: channel?.load.kind ?? 'other' },
    points,
  };
  const body = rule.inForce?.body ?? rule.body;
  const standing = state?.channels.find((one) => one.key === rule.channel);
  const point = state?.points.find((one) => one.key === body.point);
  const when = whenWords(body, preferences);
  const value = point?.quality === 'bad' ? null : (point?.value ?? null);
  return (
    <li className="grid gap-x-6 gap-y-2 p-4 sm:grid-cols-[minmax(0,1fr)_15rem]">
      <div className="min-w-0">
        <Link href={`/${house.slug}/rules/${rule.slug}`} className="group block">
          <span className="text-[0.9rem] font-semibold text-soft group-hover:underline">{rule.name}</span>
          <span className="block font-serif text-[1.15rem] leading-snug text-pretty group-hover:underline">
            <Phrases phrases={ruleHeadline(body, names, preferences)} />
          </span>
        </Link>
        <p className="mt-1 text-[0.95rem] text-soft">
          {body.rest === undefined ? null : <Phrases phrases={restSentence(body.rest, names, preferences)} />}{' '}
          {when}
        </p>
      </div>
      <div className="text-[0.95rem]">
        <p className="flex flex-wrap items-center gap-x-2">
          <BandMark
            low={Math.min(...body.band.map((one) => one.low))}
            high={Math.max(...body.band.map((one) => one.high))}
            now={value}
            extent={extent}
          />
          <span className="font-mono whitespace-nowrap">{bandWords(body, preferences)}</span>
        </p>
        <p>
          {channel === undefined ? '' : `Channel ${channel.number}: `}
          <strong className={controlRuns && standing?.state === 'on' ? 'text-ember' : undefined}>
            {standing === undefined
              ? 'not known yet'
              : `${controlRuns ? '' : 'last seen '}${standing.state === 'on' ? 'on' : 'off'}`}
          </strong>
          {value === null ? '' : `, ${controlRuns ? 'now' : 'at'} ${temperatureFigure(value, preferences)}`}
        </p>
        <p className="text-soft">
          {rule.inForce === null
            ? 'Not in force yet'
            : `Version ${rule.inForce.number} in force since ${day(Date.parse(rule.inForce.forcedAt ?? rule.inForce.draftedAt), house.zone)}`}
        </p>
        {rule.draft === null ? null : (
          <p className="font-semibold text-warn">
            {rule.inForce === null ? 'Draft' : `Draft of version ${rule.draft.number}`}, waits to be put into
            force
          </p>
        )}
      </div>
    </li>
  );
}
