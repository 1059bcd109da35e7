import { Cell, Row, RowHead, Table } from '@/components/ui/table';
import type { ComparedFigure } from '@/lib/analysis/compare';
import type { Preferences } from '@/lib/units/preferences';
import { figureName, gapWords, meanWords, verdictWords } from '@/lib/wording/duty-compare';

interface Props {
  figures: ComparedFigure[];
  heads: { chosen: string; other: string };
  preferences: Preferences;
}

const verdictLook = (figure: ComparedFigure) =>
  figure.isBeyondChance === true ? 'font-semibold' : 'text-soft';

/** A figure a row; on a phone, where five columns have no room, each figure is a block of its own. */
export function CompareTable(props: Props) {
  return (
    <>
      <div className="max-sm:hidden print:block">
        <Wide {...props} />
      </div>
      <div className="sm:hidden print:hidden">
        <Narrow {...props} />
      </div>
    </>
  );
}

function Wide({ figures, heads, preferences }: Props) {
  return (
    <Table
      caption="Side by side, a night"
      captionHidden
      columns={[
        { key: 'figure', label: 'a night, on the mean' },
        { key: 'chosen', label: heads.chosen, figure: true },
        { key: 'other', label: heads.other, figure: true },
        { key: 'gap', label: 'difference (95\u00a0% interval)', figure: true },
        { key: 'verdict', label: 'is it chance?' },
      ]}
    >
      {figures.map((figure) => (
        <Row key={figure.key}>
          <RowHead className="py-2! font-normal!">{figureName(figure.key)}</RowHead>
          <Cell figure className="py-2!">
            {meanWords(figure.key, figure.chosen, preferences)}
          </Cell>
          <Cell figure className="py-2!">
            {meanWords(figure.key, figure.other, preferences)}
          </Cell>
          <Cell figure className="py-2!">
            {figure.difference === null ? '' : gapWords(figure.key, figure.difference, preferences)}
          </Cell>
          <Cell className={`py-2! ${verdictLook(figure)}`}>{verdictWords(figure)}</Cell>
        </Row>
      ))}
    </Table>
  );
}

function Narrow({ figures, heads, preferences }: Props) {
  return (
    <ul className="divide-y divide-line border-t border-line">
      {figures.map((figure) => (
        <li key={figure.key} className="py-2">
          <p className="flex justify-between gap-3">
            <span>{figureName(figure.key)}</span>
            <span className={`text-right text-[0.9rem] ${verdictLook(figure)}`}>{verdictWords(figure)}</span>
          </p>
          <dl className="grid grid-cols-[minmax(0,1fr)_auto] gap-x-3 text-[0.9rem]">
            <dt className="text-soft">{heads.chosen}</dt>
            <dd className="text-right font-mono">{meanWords(figure.key, figure.chosen, preferences)}</dd>
            <dt className="text-soft">{heads.other}</dt>
            <dd className="text-right font-mono">{meanWords(figure.key, figure.other, preferences)}</dd>
            {figure.difference === null ? null : (
              <>
                <dt className="text-soft">difference</dt>
                <dd className="text-right font-mono">
                  {gapWords(figure.key, figure.difference, preferences)}
                </dd>
              </>
            )}
          </dl>
        </li>
      ))}
    </ul>
  );
}
