import { count } from '@/lib/units/format';

/** Tables of an archive that a person asks after, in their words; the others follow from these. */
const KINDS: readonly [table: string, one: string, more?: string][] = [
  ['switching', 'switching'],
  ['rule', 'rule'],
  ['channel', 'channel'],
  ['point', 'point'],
  ['heap_entry', 'entry of heap books', 'entries of heap books'],
  ['probe_set', 'round with the probe', 'rounds with the probe'],
  ['alarm', 'alarm'],
  ['heap_cost', 'cost of a heap', 'costs of heaps'],
];

/** What is inside, largest things named; tables without rows are not spoken of. */
export function archiveHolds(rows: Readonly<Record<string, number>>): string[] {
  return KINDS.flatMap(([table, one, more]) => {
    const many = rows[table] ?? 0;
    return many === 0 ? [] : [count(many, one, more)];
  });
}

/** @example monthSpan({ from: '2026-10', to: '2026-12' }) === 'October 2026 to December 2026' */
export function monthSpan({ from, to }: { from: string; to: string }): string {
  return from === to ? monthName(from) : `${monthName(from)} to ${monthName(to)}`;
}

const NAMES = [
  ...['January', 'February', 'March', 'April', 'May', 'June', 'July'],
  ...['August', 'September', 'October', 'November', 'December'],
];

function monthName(month: string): string {
  const [year = '', number = ''] = month.split('-');
  return `${NAMES[Number(number) - 1] ?? ''} ${year}`;
}

/** Said before an archive is put in, and again in docs/archive.md. */
export const AS_IT_COMES_IN: readonly string[] = [
  'Its houses are laid up: the rules in force rest, no relay moves and no alarm rings until you put a house in service.',
  'Field nodes have no tokens: each is given a new one on Wiring, by whoever stands at the panel.',
  'No channel counts as proved, and alarms that stood are closed.',
  'People are not let in by it: you become the owner, the others are invited anew.',
  'Letters of reports are ended, hand commands are not given a second time, and the audit log begins anew.',
  'Roll-ups and nights are made anew from the readings.',
];
