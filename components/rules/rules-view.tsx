import Link from 'next/link';
import { Notice } from '@/components/ui/notice';
import { Phrases, Sentence } from '@/components/ui/sentence';
import { ButtonLink } from '@/components/ui/button';
import { Empty } from '@/components/ui/states';
import type { HouseState } from '@/lib/schema/house-state';
import type { Rule } from '@/lib/schema/rule-view';
import type { Channel, House, Point, Source } from '@/lib/schema/yard-view';
import { temperatureFigure } from '@/lib/units/format';
import type { Preferences } from '@/lib/units/preferences';
import { day } from '@/lib/units/time';
import { bandWords, restSentence, ruleHeadline } from '@/lib/wording/rule';
import { rulesSentence } from '@/lib/wording/rule-list';
import { whenWords } from '@/lib/wording/rule-when';
import { NewRule } from './new-rule';

export interface RulesData {
  house: House;
  rules: Rule[];
  points: Point[];
  channels: Channel[];
  sources: Source[];
  state: HouseState | null;
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

function RuleRow({
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
  const { house, points, channels, state } = data;
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
          <strong className={standing?.state === 'on' ? 'text-ember' : undefined}>
            {standing === undefined ? 'not known yet' : standing.state === 'on' ? 'on' : 'off'}
          </strong>
          {value === null ? '' : `, now ${temperatureFigure(value, preferences)}`}
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

/** The page Rules: a rule a row, as its sentence. */
export function RulesView({
  data,
  allowed,
  preferences,
}: {
  data: RulesData;
  allowed: readonly string[];
  preferences: Preferences;
}) {
  const { house, rules, channels, points, sources, state } = data;
  const mayWrite = allowed.includes('rule.write');
  const isReady = channels.length > 0 && points.some((point) => point.unit === 'Cel');
  const bands = rules.flatMap((rule) => (rule.inForce?.body ?? rule.body).band);
  const extent: [number, number] = [
    Math.min(0, ...bands.map((one) => one.low)) - 2,
    Math.max(10, ...bands.map((one) => one.high)) + 2,
  ];
  const add =
    mayWrite && isReady ? (
      <NewRule
        house={house.slug}
        channels={channels}
        points={points}
        sources={sources}
        preferences={preferences}
      />
    ) : null;
  return (
    <div className="flex flex-col gap-5">
      <Sentence
        before="Rules"
        phrases={rulesSentence(
          rules.map((rule) => ({
            channelLabel: channels.find((one) => one.key === rule.channel)?.label ?? rule.channel,
            isInForce: rule.inForce !== null,
            hasDraft: rule.draft !== null,
            state: state?.channels.find((one) => one.key === rule.channel)?.state ?? null,
          })),
        )}
      />
      {mayWrite ? null : (
        <Notice tone="quiet" title="You can read the rules, not change them.">
          How warm the crop is kept is the grower’s to decide, so a grower or an owner writes rules and puts
          them into force.
        </Notice>
      )}
      {rules.length > 0 ? (
        <>
          <ul className="divide-y divide-line rounded-lg border border-line bg-sheet">
            {rules.map((rule) => (
              <RuleRow key={rule.id} rule={rule} data={data} preferences={preferences} extent={extent} />
            ))}
          </ul>
          {add === null ? null : <div>{add}</div>}
        </>
      ) : isReady ? (
        <Empty title="Write the first rule." action={add}>
          Choose the channel that it runs and the point that it goes by. It starts as a draft: nothing moves
          until you put it into force.
        </Empty>
      ) : (
        <Empty
          title="Wire a channel and a point first."
          action={<ButtonLink href={`/${house.slug}/wiring`}>Go to Wiring</ButtonLink>}
        >
          A rule runs a channel by a temperature. This house has{' '}
          {channels.length === 0 ? 'no channel' : 'no temperature point'} yet.
        </Empty>
      )}
    </div>
  );
}
