import { Panel } from '@/components/ui/panel';
import { Phrases } from '@/components/ui/sentence';
import { Cell, Row, RowHead, Table } from '@/components/ui/table';
import type { Comparison } from '@/lib/analysis/compare';
import type { Preferences } from '@/lib/units/preferences';
import { compareSentence, figureName, gapWords, meanWords, verdictWords } from '@/lib/wording/duty-compare';
import { count } from '@/lib/units/format';

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
        <Table
          caption="Side by side, a night"
          captionHidden
          columns={[
            { key: 'figure', label: 'a night, on the mean' },
            { key: 'chosen', label: heads.chosen, figure: true },
            { key: 'other', label: heads.other, figure: true },
            { key: 'gap', label: 'difference (95\u00a0% interval)', figure: true },
            { key: 'verdict', label: 'is it chance?', wideOnly: true },
          ]}
        >
          {figures.map((figure) => (
            <Row key={figure.key}>
              <RowHead className="py-2! font-normal!">
                {figureName(figure.key)}
                <span
                  className={`block text-[0.85rem] sm:hidden ${figure.isBeyondChance === true ? 'font-semibold' : 'text-soft'}`}
                >
                  {verdictWords(figure)}
                </span>
              </RowHead>
              <Cell figure className="py-2!">
                {meanWords(figure.key, figure.chosen, preferences)}
              </Cell>
              <Cell figure className="py-2!">
                {meanWords(figure.key, figure.other, preferences)}
              </Cell>
              <Cell figure className="py-2!">
                {figure.difference === null ? '' : gapWords(figure.key, figure.difference, preferences)}
              </Cell>
              <Cell
                wideOnly
                className={figure.isBeyondChance === true ? 'py-2! font-semibold' : 'py-2! text-soft'}
              >
                {verdictWords(figure)}
              </Cell>
            </Row>
          ))}
        </Table>
      )}
      <p className="max-w-prose pt-2 text-[0.85rem] text-soft">
        ± is one standard deviation of the mean: by which nights they were, and for heat by sensors and flow
        too. {count(chosen.nights, 'night')} beside {count(other.nights, 'night')}
        {left === 0 ? '' : `, ${left} left out that last or of which under 90\u00a0% was read`}.{' '}
        {isPaired
          ? 'Night is compared with the same night, so that the weather counts for neither.'
          : 'Nights that follow each other are alike, and count for fewer.'}
      </p>
    </Panel>
  );
}
