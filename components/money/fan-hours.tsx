import { Cell, Row, RowHead, Table } from '@/components/ui/table';
import type { PriceUse } from '@/lib/analysis/money-fan';
import { decimal } from '@/lib/units/format';
import { moneyFigure, priceFigure } from '@/lib/units/money';

/** At which price how much was used: dearest first. */
export function FanHours({ uses, currency }: { uses: readonly PriceUse[]; currency: string }) {
  return (
    <Table
      caption="Electricity by its price"
      captionHidden
      columns={[
        { key: 'price', label: `${currency}/kWh` },
        { key: 'hours', label: 'h', figure: true },
        { key: 'kWh', label: 'kWh', figure: true },
        { key: 'cost', label: currency, figure: true },
      ]}
    >
      {uses.map((use) => (
        <Row key={use.price}>
          <RowHead className="font-mono font-normal">{priceFigure(use.price, currency)}</RowHead>
          <Cell figure>{decimal(use.seconds / 3600, 1)}</Cell>
          <Cell figure>{decimal(use.kWh, 3)}</Cell>
          <Cell figure>{moneyFigure(use.price * use.kWh, currency)}</Cell>
        </Row>
      ))}
    </Table>
  );
}
