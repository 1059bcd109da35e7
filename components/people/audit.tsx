import { ButtonLink } from '@/components/ui/button';
import { Cell, Row, RowHead, Table } from '@/components/ui/table';
import { moment } from '@/lib/units/time';
import type { Preferences } from '@/lib/units/preferences';

export interface AuditEntry {
  id: string;
  at: string;
  by: string;
  action: string;
  subject: string;
}

/** Who did what, newest first; nothing in it can be changed. */
export function Audit({
  items,
  next,
  now,
  zone,
  preferences,
}: {
  items: AuditEntry[];
  next: string | null;
  now: number;
  zone: string;
  preferences: Preferences;
}) {
  if (items.length === 0) return <p className="text-soft">Nothing is logged yet.</p>;
  return (
    <>
      <Table
        caption="Audit log"
        captionHidden
        columns={[
          { key: 'at', label: 'When' },
          { key: 'by', label: 'Who' },
          { key: 'what', label: 'Did' },
          { key: 'subject', label: 'To', wideOnly: true },
        ]}
      >
        {items.map((entry) => (
          <Row key={entry.id}>
            <RowHead className="font-mono text-[0.9rem] font-normal! whitespace-nowrap">
              {moment(Date.parse(entry.at), now, zone, preferences)}
            </RowHead>
            <Cell className="break-all">{entry.by}</Cell>
            <Cell>{entry.action.replace(/[.-]/g, ' ')}</Cell>
            <Cell wideOnly className="break-all">
              {entry.subject}
            </Cell>
          </Row>
        ))}
      </Table>
      {next === null ? null : (
        <ButtonLink className="mt-3" href={`/people?before=${encodeURIComponent(next)}#audit`}>
          Older
        </ButtonLink>
      )}
    </>
  );
}
