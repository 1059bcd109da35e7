/** What must be said under a table of nights, so that nobody takes a sum for more than it is. */
import type { NightSummary } from '@/lib/analysis/nights';
import { share } from '@/lib/units/format';
import { capital, counted } from './counts';

/** Empty where every night was read well enough and every load's run was seen. */
export function nightNotes(nights: readonly NightSummary[]): string[] {
  const thin = nights.filter((night) => night.coverageLow);
  const assumed = nights.filter((night) => night.heat?.assumedRunning === true && night.onSeconds > 0);
  const ran = nights.filter((night) => night.heat !== null && night.onSeconds > 0);
  return [
    ...(thin.length === 0 ? [] : [thinNote(nights, thin)]),
    ...(assumed.length === 0 ? [] : [assumedNote(assumed.length, ran.length)]),
  ];
}

function thinNote(nights: readonly NightSummary[], thin: readonly NightSummary[]): string {
  const [first] = thin;
  if (nights.length === 1 && first !== undefined)
    return `Only ${share(first.coverage)} of this night was read: its sums are of what was read, not scaled up.`;
  return `* Under 90\u00a0% of ${counted(thin.length, 'night')} was read: ${thin.length === 1 ? 'its' : 'their'} sums are of what was read, not scaled up.`;
}

function assumedNote(assumed: number, ran: number): string {
  const what =
    'is taken to have run whenever its relay was on, since no run proof shows it: heat is an assumption so far';
  if (assumed === ran) return `Its load ${what}.`;
  return `${capital(counted(assumed, 'night'))}: the load ${what}.`;
}
