import { Panel } from '@/components/ui/panel';
import { Cell, Row, RowHead, Table } from '@/components/ui/table';
import type { HeapCost } from '@/lib/schema/money';
import { count } from '@/lib/units/format';
import { microsOf, moneyFigure } from '@/lib/units/money';
import { ChangeCost } from './change-cost';
import { CostForm } from './cost-form';
import { COST_WORDS } from './cost-words';
import { RemoveButton } from './remove-button';

/** What the heap cost beside its fan, and what this season bears of each. */
export function CostsPanel({
  house,
  source,
  costs,
  currency,
  today,
  mayWrite,
}: {
  house: string;
  source: string;
  costs: (HeapCost & { share: number })[];
  currency: string | null;
  today: string;
  mayWrite: boolean;
}) {
  return (
    <Panel title="What it cost beside the electricity">
      {costs.length === 0 || currency === null ? (
        <p className="text-soft">
          {currency === null
            ? 'Choose the currency first, beside “Prices”.'
            : 'None is entered yet: materials, haulage, hours at a rate, pipe, fan.'}
        </p>
      ) : (
        <Table
          caption="Own costs of the source"
          captionHidden
          columns={[
            { key: 'what', label: 'what' },
            { key: 'amount', label: `paid, ${currency}`, figure: true },
            { key: 'share', label: 'this season', figure: true },
            ...(mayWrite ? [{ key: 'remove', label: 'take out', labelHidden: true }] : []),
          ]}
        >
          {costs.map((cost) => (
            <Row key={cost.id}>
              <RowHead>
                {COST_WORDS[cost.kind]}
                <span className="block text-[0.85rem] font-normal text-soft">
                  {[cost.on, cost.text, hoursOf(cost, currency), lasts(cost.years)]
                    .filter(Boolean)
                    .join(', ')}
                </span>
              </RowHead>
              <Cell figure>{moneyFigure(microsOf(cost.amount) ?? 0, currency)}</Cell>
              <Cell figure>{moneyFigure(cost.share, currency)}</Cell>
              {mayWrite ? (
                <Cell className="text-right">
                  <ChangeCost
                    {...{ house, source, currency, today }}
                    cost={bare(cost)}
                    what={`${COST_WORDS[cost.kind]} of ${cost.on}`}
                  />
                  <RemoveButton
                    path={`/houses/${house}/heap-costs/${cost.id}`}
                    what={`${COST_WORDS[cost.kind]} of ${cost.on}`}
                  />
                </Cell>
              ) : null}
            </Row>
          ))}
        </Table>
      )}
      {mayWrite && currency !== null ? <CostForm {...{ house, source, currency, today }} /> : null}
    </Panel>
  );
}

const bare = ({ share: _, ...cost }: HeapCost & { share: number }): HeapCost => cost;

const hoursOf = ({ work }: HeapCost, currency: string) =>
  work === null ? '' : `${work.hours} h at ${work.rate} ${currency}`;
const lasts = (years: number) => (years === 1 ? '' : `for ${count(years, 'season')}`);
