import { Cell, Row, RowHead, Table } from '@/components/ui/table';
import type { PriceUse } from '@/lib/analysis/money-fan';
import { decimal } from '@/lib/units/format';
import { money, perKWh } from '@/lib/units/money';

/** At which price how much was used: dearest first. */
export function FanHours({ uses, currency }: { uses: readonly PriceUse[]; currency: string }) {
  return (
    <Table
      caption="Electricity by its price"
      captionHidden
      columns={[
        { key: 'price', label: 'price' },
        { key: 'hours', label: 'h', figure: true },
        { key: 'kWh', label: 'kWh', figure: true },
        { key: 'cost', label: 'cost', figure: true },
      ]}
    >
      {uses.map((use) => (
        <Row key={use.price}>
          <RowHead className="font-mono font-normal">{perKWh(use.price, currency)}</RowHead>
          <Cell figure>{decimal(use.seconds / 3600, 1)}</Cell>
          <Cell figure>{decimal(use.kWh, 3)}</Cell>
          <Cell figure>{money(use.price * use.kWh, currency)}</Cell>
        </Row>
      ))}
    </Table>
  );
}
