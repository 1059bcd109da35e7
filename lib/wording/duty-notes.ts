/** What must be said under a table of nights, so that nobody takes a sum for more than it is. */
import type { NightSummary } from '@/lib/analysis/nights';
import { LEAST_COVERAGE } from '@/lib/analysis/nights';
import { share } from '@/lib/units/format';
import { capital, counted } from './counts';

/** Rows are rounded one by one: who adds the column up may be a tenth or two away from its foot. */
const ROUNDED_ONCE =
  'Sums are of the nights as they are kept, and rounded once: the rows, rounded one by one, may add up to a little more or less.';

/** Empty for one night that was read well enough and in which every load's run was seen. */
export function nightNotes(nights: readonly NightSummary[]): string[] {
  const thin = nights.filter((night) => night.coverageLow && !isThinByHeat(night));
  const byHeat = nights.filter(isThinByHeat);
  const assumed = nights.filter((night) => night.heat?.assumedRunning === true && night.onSeconds > 0);
  const ran = nights.filter((night) => night.heat !== null && night.onSeconds > 0);
  return [
    ...(thin.length === 0 ? [] : [thinNote(nights, thin)]),
    ...(byHeat.length === 0 ? [] : [heatNote(nights, byHeat)]),
    ...(assumed.length === 0 ? [] : [assumedNote(assumed.length, ran.length)]),
    ...(nights.length > 1 && nights.some((night) => night.heat !== null) ? [ROUNDED_ONCE] : []),
  ];
}

/** Why a night is marked, beside its figures; null where it is not. @example '84 % of it was read' */
export function markWords(night: Pick<NightSummary, 'coverageLow' | 'coverage'>): string | null {
  if (!night.coverageLow) return null;
  return night.coverage < LEAST_COVERAGE
    ? `${share(night.coverage)} of it was read`
    : 'a loop was not read all the while that it ran';
}

/** The house was read well enough, and the loop was not while it ran. */
function isThinByHeat({ coverageLow, coverage, heatMeasured }: NightSummary): boolean {
  return coverageLow && coverage >= LEAST_COVERAGE && heatMeasured !== null;
}

function heatNote(nights: readonly NightSummary[], thin: readonly NightSummary[]): string {
  const [first] = thin;
  const rest = 'heat is of what was read, not scaled up';
  if (nights.length === 1 && first !== undefined)
    return `Only ${share(first.heatMeasured)} of the run was read at both ends of the loop: its ${rest}.`;
  return `* In ${counted(thin.length, 'night')} under 90\u00a0% of the run was read at both ends of the loop: ${thin.length === 1 ? 'its' : 'their'} ${rest}.`;
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
