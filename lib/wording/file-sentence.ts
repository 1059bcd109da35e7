import { count } from '@/lib/units/format';
import type { Phrase } from './phrase';

/** Opens the page of files: what is under way, else what has come in. */
export function fileSentence(
  imports: readonly { state: string; name: string; brought: number }[],
  house: string,
): Phrase[] {
  const moving = imports.find((one) => ['to-check', 'to-bring', 'to-undo'].includes(one.state));
  if (moving !== undefined) {
    const deed =
      moving.state === 'to-check'
        ? 'is being looked through'
        : moving.state === 'to-bring'
          ? 'is being brought in'
          : 'is being taken back';
    return [{ text: moving.name, tone: 'strong' }, ` ${deed}; you may close this page meanwhile.`];
  }
  const done = imports.filter((one) => one.state === 'done');
  if (done.length === 0)
    return [`What a logger kept of ${house} can come in here, and every table of the house can go out.`];
  const readings = done.reduce((sum, one) => sum + one.brought, 0);
  return [
    `${count(done.length, 'file')} brought `,
    { text: count(readings, 'reading'), tone: 'strong' },
    ` into ${house}; ${done.length === 1 ? 'it' : 'each'} can be taken back whole.`,
  ];
}
