import { Panel } from '@/components/ui/panel';
import { Cell, Row, RowHead, Table } from '@/components/ui/table';
import type { Balance } from '@/lib/analysis/money-balance';
import { energyOf } from '@/lib/analysis/money-fuels';
import type { FuelBody } from '@/lib/schema/money';
import { decimal, share, UNKNOWN } from '@/lib/units/format';
import { moneyFigure, priceFigure } from '@/lib/units/money';
import { capital } from '@/lib/wording/counts';
import { ALTERNATIVE_WORDS } from '@/lib/wording/money';

/** The same heat from what is bought, cheapest first, the heap among them. */
export function Alternatives({
  balance,
  currency,
  fuels,
}: {
  balance: Balance;
  currency: string;
  fuels: readonly FuelBody[];
}) {
  const { allIn, alternatives, own, fan } = balance;
  const rows = alternatives.map(({ kind, perKWh: price, same }) => ({
    name: ALTERNATIVE_WORDS[kind],
    price: priceFigure(price, currency),
    sort: price,
    same: same === null ? UNKNOWN : moneyFigure(same.micros, currency),
    sd: same === null ? '' : `\u00a0±\u00a0${moneyFigure(same.sd, currency)}`,
    note: noteOf(fuels.find((one) => one.fuel === kind)),
  }));
  if (typeof allIn !== 'string')
    rows.push({
      name: 'this source, all in',
      price: give(priceFigure(allIn.perKWh, currency), priceFigure(allIn.sd, currency)),
      sort: allIn.perKWh,
      same: moneyFigure((own ?? 0) + (fan.micros ?? 0), currency),
      sd: '',
      note: 'what was paid',
    });
  rows.sort((a, b) => a.sort - b.sort);
  return (
    <Panel title="The same heat, from what can be bought">
      {rows.length === 0 ? (
        <p className="text-soft">Not known yet: enter what electricity or a fuel costs.</p>
      ) : (
        <Table
          caption="The same heat from other sources"
          captionHidden
          columns={[
            { key: 'from', label: 'from' },
            { key: 'price', label: `${currency} for 1 kWh`, figure: true },
            { key: 'same', label: `the same, ${currency}`, figure: true },
          ]}
        >
          {rows.map((row) => (
            <Row key={row.name}>
              <RowHead>{row.name}</RowHead>
              <Cell figure>{row.price}</Cell>
              <Cell figure>
                {row.same}
                {/* on a phone there is room for the deviation of the price alone, which is the same share */}
                <span className="max-sm:hidden">{row.sd}</span>
              </Cell>
            </Row>
          ))}
        </Table>
      )}
      <ul className="flex flex-col gap-1 pt-2 text-[0.85rem] text-soft empty:hidden">
        {rows.map((row) => (
          <li key={row.name}>
            {capital(row.name)}: {row.note}.
          </li>
        ))}
      </ul>
    </Panel>
  );
}

const give = (value: string, sd: string) => `${value}\u00a0±\u00a0${sd}`;

function noteOf(fuel: FuelBody | undefined): string {
  if (fuel === undefined) return 'at what its hours cost on the mean, 1 kWh of heat for 1 kWh';
  const energy = energyOf(fuel);
  if (energy === null) return UNKNOWN;
  return `${decimal(energy.kWh, 2)} kWh in a ${fuel.unit} (${energy.source}), ${share(fuel.efficiency)} of it as heat`;
}
