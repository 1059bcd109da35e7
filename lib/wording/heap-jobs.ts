/**
 * The heap's year as jobs with lists: a start that the holding makes its own. The days are common practice for cold
 * winters of the house's hemisphere, no source; the lists carry the cautions that belong to each.
 */

export type JobKind = 'build' | 'first-frost' | 'spring' | 'rebuild' | 'own';

export interface JobTemplate {
  kind: Exclude<JobKind, 'own'>;
  title: string;
  /** MM-DD in the north; the south has it half a year later. */
  day: string;
  checklist: readonly string[];
}

export const JOB_TEMPLATES: readonly JobTemplate[] = [
  {
    kind: 'build',
    title: 'Build the heap',
    day: '09-15',
    checklist: [
      'Stuff together: manure, straw or leaves, chips; mix reckoned for 25 to 40 : 1 and 50 to 60 % water',
      'Loop laid, its joints tight: the fan blows into the pipe, never sucks from it',
      'Core, base and edge probes in, and read on Watch',
      'Built to a hand over the pipe at least, damped layer by layer',
      'Insulation round it and a cover that sheds rain and breathes',
      'Certified carbon monoxide alarm in the house, tested',
      'Entered in the book: what went in, how large',
    ],
  },
  {
    kind: 'first-frost',
    title: 'Ready for the first frost',
    day: '10-10',
    checklist: [
      'Core over its floor and steady for a week',
      'Bands and rests looked through; a trial on a cold night',
      'Last-resort thermostat set under the lowest band, and tried',
      'Residual-current device tested with its button',
      'A test alarm sent to each contact, and answered',
      'Feed for the winter under cover, within reach in snow',
      'Shovel, lamp and water by the heap',
    ],
  },
  {
    kind: 'spring',
    title: 'Let the heap go in spring',
    day: '04-20',
    checklist: [
      'Rules retired or their season over; the fan’s isolator off',
      'Winter’s report looked at: heat, power, what to do otherwise',
      'Cover off on a mild day, the heap opened in the open air only',
      'Probes out, cleaned, checked in ice water',
      'Pipe blown through and looked over for wet and for breaks',
    ],
  },
  {
    kind: 'rebuild',
    title: 'Rebuild for the next winter',
    day: '08-25',
    checklist: [
      'Old stuff out and laid to ripen: time at temperature is a record, not an approval',
      'Pit or bay, walls and insulation mended',
      'Materials ordered; own ones weighed and dried once',
      'Lift little, from the legs, or share the work',
    ],
  },
];

/** The next such day from `today` on. @param today YYYY-MM-DD @example nextDay('09-15', '2026-12-01', 54) === '2027-09-15' */
export function nextDay(day: string, today: string, latitude: number): string {
  const [month = 1, date = 1] = day.split('-').map(Number);
  const here = latitude < 0 ? ((month + 5) % 12) + 1 : month;
  const year = Number(today.slice(0, 4));
  // the 28th is in every month: no template lies behind it
  const of = (one: number) => `${one}-${String(here).padStart(2, '0')}-${String(date).padStart(2, '0')}`;
  return of(year) >= today ? of(year) : of(year + 1);
}
