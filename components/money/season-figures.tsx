import { Figures, Panel } from '@/components/ui/panel';
import type { Balance } from '@/lib/analysis/money-balance';
import { seasonRows } from '@/lib/wording/report-money';

export function SeasonFigures({
  balance,
  currency,
  season,
}: {
  balance: Balance;
  currency: string;
  season: string;
}) {
  return (
    <Panel title={`Season ${season}, so far`}>
      <Figures rows={seasonRows(balance, currency)} />
      <p className="pt-2 text-[0.85rem] text-soft">
        What was paid stands before the heat that is still to come, so early in a season the price is high.
        Only the fans are counted of the electricity, at the hours in which they ran; standing charges are
        not.
      </p>
    </Panel>
  );
}
