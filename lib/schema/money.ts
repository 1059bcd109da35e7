import { z } from 'zod';
import { FUEL_UNITS, FUELS } from '@/lib/analysis/money-fuels';
import { microsOf } from '@/lib/units/money';
import { ClockTime, finite, listOf } from './common';

export const Day = z.iso
  .date({ error: 'Give a day as YYYY-MM-DD.' })
  .refine((value) => value >= '1970' && value < '2200', { error: 'Give a day between 1970 and 2200.' });

/** As text, so that no binary fraction comes between what is entered and what is kept. */
export const Price = z
  .string()
  .regex(/^\d{1,9}(\.\d{1,6})?$/, 'Give an amount such as 0.2875, of six places at most.');

export const Currency = z
  .string()
  .refine(
    (value) => Intl.supportedValuesOf('currency').includes(value),
    'Give an ISO 4217 code, such as EUR.',
  );

export const DAYS = ['all', 'weekdays', 'weekend'] as const;
const Band = z.strictObject({ from: ClockTime, to: ClockTime, days: z.enum(DAYS), price: Price });
/** Where no band holds, `price`; of two that hold, the first. Prices are of a kWh. */
export const TariffBody = z.strictObject({ from: Day, price: Price, bands: z.array(Band).max(12) });
export type TariffBody = z.infer<typeof TariffBody>;

/** A share in a body, per cent in the form. */
const EFFICIENCY = 'What becomes heat is a share from 5 to 110 %, 0.05 to 1.1.';

export const FuelBody = z
  .strictObject({
    fuel: z.enum(FUELS),
    unit: z.string().max(20),
    price: Price,
    /** Energy in a unit; null takes the published figure. */
    kWh: finite(0.1, 20_000, 'kWh').nullable(),
    efficiency: z.number({ error: EFFICIENCY }).min(0.05, EFFICIENCY).max(1.1, EFFICIENCY),
  })
  .refine(({ fuel, unit }) => FUEL_UNITS[fuel].some((one) => one.unit === unit), {
    path: ['unit'],
    error: 'This fuel is not sold in that unit here.',
  });
export type FuelBody = z.infer<typeof FuelBody>;

const once = (values: readonly string[]) => new Set(values).size === values.length;
const book = {
  currency: Currency,
  tariffs: z
    .array(TariffBody)
    .max(40)
    .refine((all) => once(all.map((one) => one.from)), 'Two tariffs begin on the same day.'),
  fuels: z
    .array(FuelBody)
    .max(FUELS.length)
    .refine((all) => once(all.map((one) => one.fuel)), 'One price for each fuel.'),
};
/** `revision` is of the book that was read: another one's change meanwhile is not written over. */
export const MoneyBookWrite = z.strictObject({ revision: z.number().int().min(0), ...book });
export const MoneyBook = z.strictObject({
  revision: z.number(),
  ...book,
  /** Null until somebody has chosen. */
  currency: z.string().nullable(),
});
export type MoneyBook = z.infer<typeof MoneyBook>;

export const COST_KINDS = ['materials', 'haulage', 'work', 'pipe', 'fan', 'other'] as const;
const Hours = z.string().regex(/^\d{1,5}(\.\d{1,2})?$/, 'Give hours, such as 3.5.');
const cost = {
  kind: z.enum(COST_KINDS),
  on: Day,
  text: z.string().trim().max(200),
  years: z.number().int('Give whole years.').min(1, 'At least 1.').max(30, 'At most 30.'),
};
/** Either an amount, or hours at a rate. */
export const HeapCostCreate = z
  .strictObject({
    source: z.string().min(1, 'Choose the heap.').max(140),
    ...cost,
    text: cost.text.default(''),
    years: cost.years.default(1),
    amount: Price.nullable().default(null),
    work: z.strictObject({ hours: Hours, rate: Price }).nullable().default(null),
  })
  .refine(({ amount, work }) => (amount === null) !== (work === null), {
    path: ['amount'],
    error: 'Give an amount, or hours and a rate.',
  })
  .refine((given) => (amountOf(given) ?? 0) <= 1e15, { path: ['amount'], error: 'Under 1 000 000 000.' });

/** Whole micros, half a micro up. Hours have two places at most, so that the product is whole before it is divided. */
export function amountOf(given: {
  amount: string | null;
  work: { hours: string; rate: string } | null;
}): number | null {
  if (given.work === null) return given.amount === null ? null : microsOf(given.amount);
  const [hours, rate] = [microsOf(given.work.hours), microsOf(given.work.rate)];
  if (hours === null || rate === null) return null;
  return Number((BigInt(hours) * BigInt(rate) + 500_000n) / 1_000_000n);
}

export const HeapCost = z.strictObject({
  id: z.string(),
  source: z.string(),
  ...cost,
  amount: z.string(),
  work: z.strictObject({ hours: z.string(), rate: z.string() }).nullable(),
  by: z.string(),
});
export type HeapCost = z.infer<typeof HeapCost>;
export const HeapCostList = listOf(HeapCost);
export const HeapCostQuery = z.strictObject({ source: z.string().max(140).optional() });
