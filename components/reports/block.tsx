import { Figures } from '@/components/ui/panel';
import { Phrases } from '@/components/ui/sentence';
import { Cell, Row, RowHead, Table } from '@/components/ui/table';
import type { ReportBlock } from '@/lib/wording/report';

/** Columns of nights and of houses are figures; those of alarms and the book are words. */
const isFigures = (block: ReportBlock) => block.key === 'nights' || block.key === 'houses';

export function Block({ block, level = 2 }: { block: ReportBlock; level?: 2 | 3 }) {
  const Title = level === 2 ? 'h2' : 'h3';
  const { title, sentence, rows, table, notes } = block;
  const figure = isFigures(block);
  return (
    <section className="flex min-w-0 flex-col gap-2 print:mt-5">
      <Title className="text-[1.1rem] font-semibold print:break-after-avoid">{title}</Title>
      {sentence === undefined ? null : (
        <p className="max-w-[70ch] font-serif text-[1.05rem]">
          <Phrases phrases={sentence} />
        </p>
      )}
      {table === undefined ? null : (
        <Table
          caption={title}
          captionHidden
          columns={table.head.map((label, at) => ({ key: label, label, figure: figure && at > 0 }))}
          foot={
            table.foot === undefined ? undefined : (
              <tr>
                {table.foot.map((text, at) =>
                  at === 0 ? (
                    <RowHead key={at}>{text}</RowHead>
                  ) : (
                    <Cell key={at} figure={figure}>
                      {text}
                    </Cell>
                  ),
                )}
              </tr>
            )
          }
        >
          {table.rows.map(([first, ...rest], at) => (
            <Row key={at} className="print:break-inside-avoid">
              <RowHead className="print:py-1">{first}</RowHead>
              {rest.map((text, place) => (
                <Cell key={place} figure={figure} className="print:py-1">
                  {text}
                </Cell>
              ))}
            </Row>
          ))}
        </Table>
      )}
      {rows === undefined || rows.length === 0 ? null : <Figures rows={rows} />}
      {(notes ?? []).map((note) => (
        <p key={note} className="text-[0.85rem] text-soft">
          {note}
        </p>
      ))}
    </section>
  );
}
