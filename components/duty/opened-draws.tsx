import { Cell, Row, RowHead, Table } from '@/components/ui/table';
import type { ChannelNight, DrawHeat } from '@/lib/analysis/nights';
import { decimal, share } from '@/lib/units/format';
import type { Preferences } from '@/lib/units/preferences';
import { clock, duration } from '@/lib/units/time';

/** Each draw of a night with the heat it brought; what was not measured, or only assumed, says so. */
export function Draws({
  draws,
  channels,
  zone,
  preferences,
}: {
  draws: DrawHeat[];
  channels: ChannelNight[];
  zone: string;
  preferences: Preferences;
}) {
  if (draws.length === 0) return <p className="text-soft">Nothing was drawn in this night.</p>;
  const many = channels.length > 1;
  const labelOf = (number: number) => channels.find((one) => one.number === number)?.label ?? String(number);
  return (
    <Table
      caption="Draws"
      columns={[
        { key: 'from', label: 'from' },
        ...(many ? [{ key: 'channel', label: 'load' }] : []),
        { key: 'for', label: 'ran for', figure: true },
        { key: 'heat', label: 'kWh', figure: true },
      ]}
    >
      {draws.map((draw) => (
        <Row key={`${draw.from} ${draw.channel}`}>
          <RowHead className="whitespace-nowrap py-1.5! font-mono font-normal!">
            {clock(draw.from, zone, preferences)}
          </RowHead>
          {many ? <Cell className="py-1.5!">{labelOf(draw.channel)}</Cell> : null}
          <Cell figure className="py-1.5!">
            {duration((draw.to - draw.from) / 1000)}
            {draw.standingSeconds === 0 ? null : (
              <span className="block font-sans text-[0.85rem] text-warn">
                stood still for {duration(draw.standingSeconds)}
              </span>
            )}
          </Cell>
          <Cell figure className="py-1.5!">
            {draw.heat === null ? (
              <span className="font-sans text-soft">not known</span>
            ) : (
              `${decimal(draw.heat.kWh, 2)} ± ${decimal(draw.heat.sd, 2)}`
            )}
            {draw.heat === null || draw.measured >= 0.995 ? null : (
              <span className="block font-sans text-[0.85rem] text-soft">
                {share(draw.measured)} of it was read
              </span>
            )}
          </Cell>
        </Row>
      ))}
    </Table>
  );
}
