import { Notice } from '@/components/ui/notice';
import { Sentence } from '@/components/ui/sentence';
import { ButtonLink } from '@/components/ui/button';
import { Empty } from '@/components/ui/states';
import type { Preferences } from '@/lib/units/preferences';
import { rulesSentence } from '@/lib/wording/rule-list';
import { NewRule } from './new-rule';
import { RetiredRules } from './retired-rules';
import { RuleRow, type RulesData } from './rule-row';

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
            // words of the present would be untrue of what nobody looks at
            state: data.controlRuns
              ? (state?.channels.find((one) => one.key === rule.channel)?.state ?? null)
              : null,
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
      <RetiredRules rules={data.retired} channels={channels} house={house.slug} zone={house.zone} />
    </div>
  );
}
