/** What stands between the mains and a load, in words: what is missing, and whether its test is due. */
import { contactLoad, isMains, ratedAmps, type LoadOnContact } from '@/lib/physics/contact';
import { decimal } from '@/lib/units/format';
import { ampsWords, contactFit } from './wiring-load';

export interface Protection {
  contactor: boolean;
  fuseAmps: number;
  cableMm2?: number | undefined;
  ip?: string | undefined;
  rcdMilliamps?: number | undefined;
  rcdTestedOn?: string | undefined;
  rcdTestEveryMonths?: number | undefined;
}

const space = '\u00a0';
const plain = (value: number) => decimal(value, Number.isInteger(value) ? 0 : 1);

/** Months after which a residual-current device is pressed again where nobody has said: common practice, no source. */
export const USUAL_RCD_MONTHS = 6;

/** @example "behind an enclosed contactor, fuse 10 A, cable 1.5 mm², IP65, RCD 30 mA" */
export function protectionWords(protection: Protection): string {
  const { contactor, fuseAmps, cableMm2, ip, rcdMilliamps } = protection;
  return [
    contactor ? 'behind an enclosed contactor' : 'no contactor',
    `fuse ${plain(fuseAmps)}${space}A`,
    ...(cableMm2 === undefined ? [] : [`cable ${plain(cableMm2)}${space}mm²`]),
    ...(ip === undefined ? [] : [ip]),
    rcdMilliamps === undefined ? 'no RCD told' : `RCD ${plain(rcdMilliamps)}${space}mA`,
  ].join(', ');
}

/** Whether the residual-current device is to be tested again. `today` is a date, YYYY-MM-DD, where the house stands. */
export function rcdTest(
  protection: Protection,
  today: string,
): { state: 'none' | 'never' | 'good' | 'due'; dueOn: string | null } {
  if (protection.rcdMilliamps === undefined) return { state: 'none', dueOn: null };
  if (protection.rcdTestedOn === undefined) return { state: 'never', dueOn: null };
  const dueOn = monthsAfter(protection.rcdTestedOn, protection.rcdTestEveryMonths ?? USUAL_RCD_MONTHS);
  return { state: today > dueOn ? 'due' : 'good', dueOn };
}

/** The same day of a later month, or its last. @example monthsAfter('2026-08-31', 6) === '2027-02-28' */
export function monthsAfter(date: string, months: number): string {
  const [year = 0, month = 1, day = 1] = date.split('-').map(Number);
  const last = new Date(Date.UTC(year, month - 1 + months + 1, 0)).getUTCDate();
  return new Date(Date.UTC(year, month - 1 + months, Math.min(day, last))).toISOString().slice(0, 10);
}

/** @example "RCD tested on 2026-04-01, due again since 2026-10-01" */
export function rcdWords(protection: Protection, today: string): string {
  const { state, dueOn } = rcdTest(protection, today);
  if (state === 'none') return 'No residual-current device is told of.';
  if (state === 'never') return 'The residual-current device: no test is written down.';
  const by =
    protection.rcdTestEveryMonths === undefined
      ? ` (${USUAL_RCD_MONTHS} months is common practice; local code decides)`
      : '';
  return state === 'due'
    ? `The residual-current device was last tested on ${protection.rcdTestedOn}; a test is due since ${dueOn}${by}.`
    : `The residual-current device was tested on ${protection.rcdTestedOn}; next by ${dueOn}${by}.`;
}

export interface RatingVerdict {
  isFit: boolean;
  /** The arithmetic, or what is missing and where to say it. */
  words: string;
}

/** Whether a load may be proved on its contact and behind its protection. */
export function ratingVerdict(
  load: LoadOnContact & { kind: string },
  protection: Protection | null,
  hasHighLimit: boolean,
): RatingVerdict {
  const missing = missingWords(load, protection, hasHighLimit);
  if (missing !== null) return { isFit: false, words: missing };
  const fit = contactFit({
    kind: load.kind,
    watts: load.watts ?? undefined,
    volts: load.volts ?? undefined,
    supply: load.supply ?? undefined,
    contactAmps: load.contactAmps ?? undefined,
  });
  const carried = contactLoad(load);
  const amps = ratedAmps(load);
  if (fit === null || carried === null || amps === null)
    return { isFit: false, words: 'The load is not told.' };
  const said = fit.words.map((one) => (typeof one === 'string' ? one : one.text)).join('');
  const sum = `${plain(load.watts ?? 0)}${space}W ÷ ${plain(load.volts ?? 0)}${space}V = ${said}`;
  if (fit.isOver)
    return {
      isFit: false,
      words: `${sum}. Use a contactor or another relay, and say so in the channel’s form.`,
    };
  if (protection !== null && amps > protection.fuseAmps)
    return {
      isFit: false,
      words: `${sum}; but the load draws more than its fuse of ${ampsWords(protection.fuseAmps)}, which would blow.`,
    };
  const behind = protection === null ? '' : `; ${protectionWords(protection)}`;
  return { isFit: true, words: `${sum}${behind}.` };
}

function missingWords(
  load: LoadOnContact,
  protection: Protection | null,
  hasHighLimit: boolean,
): string | null {
  const lacks = [
    ...(typeof load.watts === 'number' ? [] : ['rated power']),
    ...(typeof load.volts === 'number' ? [] : ['supply voltage']),
    ...(load.supply === 'ac' || load.supply === 'dc' ? [] : ['AC or DC']),
    ...(typeof load.contactAmps === 'number' ? [] : ['the contact’s rating']),
  ];
  if (lacks.length > 0) return `Say in the channel’s form: ${lacks.join(', ')}. Without it nobody can tell.`;
  if (load.kind === 'heater' && !hasHighLimit)
    return 'A heater needs a high limit: set one in the channel’s form, so that it is switched off above it.';
  if (!isMains(load)) return null;
  if (protection === null)
    return 'This is a mains circuit: say in the channel’s form what protects it (contactor, fuse, cable, enclosure, residual-current device).';
  const open = [
    ...(protection.cableMm2 === undefined ? ['the cable'] : []),
    ...(protection.ip === undefined ? ['the enclosure’s IP mark'] : []),
    ...(protection.rcdMilliamps === undefined ? ['the residual-current device'] : []),
    ...(protection.rcdTestedOn === undefined ? ['the date of its test'] : []),
  ];
  return open.length === 0 ? null : `This is a mains circuit: say in the channel’s form ${open.join(', ')}.`;
}
