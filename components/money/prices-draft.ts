/** Prices as they stand in the form: all text, and read by the same schema as the interface reads them. */
import { FUEL_UNITS, FUELS, type Fuel, USUAL_EFFICIENCY } from '@/lib/analysis/money-fuels';
import { type MoneyBook, MoneyBookWrite } from '@/lib/schema/money';
import { numberTyped } from '@/lib/units/typed';

export interface BandDraft {
  from: string;
  to: string;
  days: string;
  price: string;
}
export interface TariffDraft {
  from: string;
  price: string;
  bands: BandDraft[];
}
export interface FuelDraft {
  fuel: Fuel;
  unit: string;
  price: string;
  kWh: string;
  efficiency: string;
}
export interface PricesDraft {
  currency: string;
  tariffs: TariffDraft[];
  fuels: FuelDraft[];
}

/** A fuel without a price is shown for entering and not sent. */
export function draftOf(book: MoneyBook): PricesDraft {
  return {
    currency: book.currency ?? '',
    tariffs: book.tariffs.map((one) => ({ ...one, bands: one.bands.map((band) => ({ ...band })) })),
    fuels: FUELS.map((fuel) => {
      const known = book.fuels.find((one) => one.fuel === fuel);
      return {
        fuel,
        unit: known?.unit ?? FUEL_UNITS[fuel][0]?.unit ?? '',
        price: known?.price ?? '',
        kWh: known?.kWh?.toString() ?? '',
        efficiency: String(Math.round((known?.efficiency ?? USUAL_EFFICIENCY[fuel]) * 1000) / 10),
      };
    }),
  };
}

const plain = (text: string) => text.trim().replace(',', '.');

/** @returns the body, or by the dotted path of each field what is wrong with it */
export function bodyOfPrices(draft: PricesDraft, revision: number) {
  const number = (text: string) => numberTyped(text) ?? Number.NaN;
  const shown = draft.fuels.filter((one) => one.price.trim() !== '');
  const told = MoneyBookWrite.safeParse({
    revision,
    currency: draft.currency.trim().toUpperCase(),
    tariffs: draft.tariffs.map((one) => ({
      ...{ from: one.from, price: plain(one.price) },
      bands: one.bands.map((band) => ({ ...band, price: plain(band.price) })),
    })),
    fuels: shown.map((one) => ({
      ...{ fuel: one.fuel, unit: one.unit, price: plain(one.price) },
      kWh: one.kWh.trim() === '' ? null : number(one.kWh),
      efficiency: number(one.efficiency) / 100,
    })),
  });
  if (told.success) return { ok: true as const, body: told.data };
  const fields = told.error.issues.map((issue) => {
    const [list, at, ...rest] = issue.path;
    const fuel = list === 'fuels' ? shown[Number(at)]?.fuel : undefined;
    return [[list, fuel ?? at, ...rest].filter((part) => part !== undefined).join('.'), issue.message];
  });
  return { ok: false as const, fields: Object.fromEntries(fields) as Record<string, string> };
}
