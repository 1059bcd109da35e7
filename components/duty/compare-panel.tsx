import { Panel } from '@/components/ui/panel';
import { Phrases } from '@/components/ui/sentence';
import type { Comparison } from '@/lib/analysis/compare';
import { count } from '@/lib/units/format';
import type { Preferences } from '@/lib/units/preferences';
import { compareSentence } from '@/lib/wording/duty-compare';
import { CompareTable } from './compare-table';

export interface ComparePanelProps {
  comparison: Comparison;
  /** In a sentence: "the gate heap", "the 7 nights before". */
  what: string;
  than: string;
  /** Over the columns. */
  heads: { chosen: string; other: string };
  preferences: Preferences;
}

/** The chosen nights beside others: figures a night with what they are uncertain by, and what chance would do. */
export function ComparePanel({ comparison, what, than, heads, preferences }: ComparePanelProps) {
  const { figures, chosen, other, isPaired } = comparison;
  const left = chosen.leftOut + other.leftOut;
  return (
    <Panel title="Side by side">
      <p className="max-w-[64ch] pb-2 font-serif text-[1.15rem] leading-snug">
        <Phrases phrases={compareSentence(comparison, what, than)} />
      </p>
      {figures.length === 0 ? null : (
        <CompareTable figures={figures} heads={heads} preferences={preferences} />
      )}
      <p className="max-w-prose pt-2 text-[0.85rem] text-soft">
        ± is one standard deviation of the mean: by which nights they were, and by what probes and flow may be
        wrong. {count(chosen.nights, 'night')} beside {count(other.nights, 'night')}
        {left === 0 ? '' : `, ${left} left out that last or of which under 90\u00a0% was read`}.{' '}
        {isPaired
          ? 'Night is compared with the same night, so that the weather counts for neither.'
          : 'Nights that follow each other are alike, and count for fewer.'}
      </p>
    </Panel>
  );
}
