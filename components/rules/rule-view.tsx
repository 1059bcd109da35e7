import Link from 'next/link';
import { KeepFresh } from '@/components/ui/keep-fresh';
import { compileTimeFacts, place } from '@/lib/control/calendar';
import type { HouseState } from '@/lib/schema/house-state';
import type { Channel, Source } from '@/lib/schema/yard-view';
import type { Preferences } from '@/lib/units/preferences';
import { Reading } from './conditions/reading';
import { drawNight, type NightOfRule } from './draw-night';
import { EditorNotices } from './editor-notices';
import { formOf } from './form-values';
import { RuleEditor } from './rule-editor';
import { Versions } from './versions';

export interface RuleData extends NightOfRule {
  others: string[];
  channels: Channel[];
  sources: Source[];
  state: HouseState | null;
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
  const mayWrite = allowed.includes('rule.write');
  const pointStates = state?.points ?? [];
  const names = {
    channel: { label: channel?.label ?? rule.channel, loadKind: channel?.load.kind ?? 'other' },
    points: points.map(({ key, name, role, unit }) => ({ key, name, role, unit })),
  };
  const clock = clockOf(house, now);
  const factOf = (fact: string) => points.find((one) => one.key === fact);
  const values = formOf(rule.body, factOf, preferences);
  const told = { rule, names, preferences, mayWrite, now, zone: house.zone };
  return (
    <div className="flex flex-col gap-5">
      {/* what conditions go by moves while somebody looks; what is typed stays */}
      <KeepFresh everyS={15} />
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
        parts={{
          notices: <EditorNotices {...told} />,
          conditions: (
            <Reading node={values.only} facts={{ now: pointStates, clock, names, factOf, preferences }} />
          ),
          versions: <Versions {...told} />,
        }}
        data={{
          ...{ rule, values, points, pointStates, names, clock, preferences, mayWrite },
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
        }}
      />
    </div>
  );
}

function clockOf(house: RuleData['house'], now: number) {
  const facts = compileTimeFacts(place(house))(now);
  return {
    'time.hour': facts.hour,
    'time.month': facts.month,
    'time.weekday': facts.weekday,
    'time.sunUp': facts.sunUp,
  };
}
