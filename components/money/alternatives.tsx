import { Panel } from '@/components/ui/panel';
import { Cell, Row, RowHead, Table } from '@/components/ui/table';
import type { Balance } from '@/lib/analysis/money-balance';
import { energyOf } from '@/lib/analysis/money-fuels';
import type { FuelBody } from '@/lib/schema/money';
import { decimal, share, UNKNOWN } from '@/lib/units/format';
import { money, perKWh } from '@/lib/units/money';
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
    price: perKWh(price, currency),
    sort: price,
    same: same === null ? UNKNOWN : money(same.micros, currency, same.sd),
    note: noteOf(fuels.find((one) => one.fuel === kind)),
  }));
  if (typeof allIn !== 'string')
    rows.push({
      name: 'this source, all in',
      price: perKWh(allIn.perKWh, currency, allIn.sd),
      sort: allIn.perKWh,
      same: money((own ?? 0) + (fan.micros ?? 0), currency),
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
            { key: 'price', label: 'a kWh of heat', figure: true },
            { key: 'same', label: 'the same heat', figure: true },
          ]}
        >
          {rows.map((row) => (
            <Row key={row.name}>
              <RowHead>
                {row.name}
                <span className="block text-[0.85rem] font-normal text-soft">{row.note}</span>
              </RowHead>
              <Cell figure>{row.price}</Cell>
              <Cell figure>{row.same}</Cell>
            </Row>
          ))}
        </Table>
      )}
    </Panel>
  );
}

function noteOf(fuel: FuelBody | undefined): string {
  if (fuel === undefined) return 'at what its hours cost on the mean, 1 kWh of heat for 1 kWh';
  const energy = energyOf(fuel);
  if (energy === null) return UNKNOWN;
  return `${decimal(energy.kWh, 2)} kWh in a ${fuel.unit} (${energy.source}), ${share(fuel.efficiency)} of it as heat`;
}
