import Link from 'next/link';
import { Panel } from '@/components/ui/panel';
import type { Rule } from '@/lib/schema/rule-view';
import type { Channel } from '@/lib/schema/yard-view';
import { day } from '@/lib/units/time';

/** Rules that nothing runs by any more; their pages keep the versions, and bring them back. */
export function RetiredRules({
  rules,
  channels,
  house,
  zone,
}: {
  rules: Rule[];
  channels: Channel[];
  house: string;
  zone: string;
}) {
  if (rules.length === 0) return null;
  return (
    <Panel title="Retired" note="Nothing runs by these. Open one to read its versions or to bring it back.">
      <ul className="divide-y divide-line">
        {rules.map((rule) => (
          <li key={rule.id} className="flex flex-wrap items-center justify-between gap-x-4 text-soft">
            <Link
              href={`/${house}/rules/${rule.slug}`}
              className="inline-flex min-h-11 items-center underline underline-offset-4"
            >
              {rule.name}
            </Link>
            <span className="text-[0.9rem]">
              {channels.find((one) => one.key === rule.channel)?.label ?? rule.channel}
              {retiredWords(rule, zone)}
            </span>
          </li>
        ))}
      </ul>
    </Panel>
  );
}

/** @example ", retired 12 April by grower@larkmoor.example: “The heap is spent.”" */
function retiredWords({ retired }: Rule, zone: string): string {
  if (retired === null) return '';
  const by = retired.by === null ? '' : ` by ${retired.by}`;
  const why = retired.why === null ? '' : `: “${retired.why}”`;
  return `, retired ${day(Date.parse(retired.at), zone)}${by}${why}`;
}
