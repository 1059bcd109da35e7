import { NumberField, Select } from '@/components/ui/field';
import { energyOf, FUEL_UNITS } from '@/lib/analysis/money-fuels';
import { ALTERNATIVE_WORDS } from '@/lib/wording/money';
import { capital } from '@/lib/wording/counts';
import type { FuelDraft } from './prices-draft';

/** What a fuel costs, how much energy is in it, and how much of that becomes heat: all the owner's to change. */
export function FuelFields({
  fuels,
  currency,
  errors,
  onChange,
}: {
  fuels: readonly FuelDraft[];
  currency: string;
  errors: Record<string, string>;
  onChange: (fuels: FuelDraft[]) => void;
}) {
  return fuels.map((one) => {
    const put = (change: Partial<FuelDraft>) =>
      onChange(fuels.map((other) => (other.fuel === one.fuel ? { ...other, ...change } : other)));
    const published = energyOf({ fuel: one.fuel, unit: one.unit, kWh: null });
    const error = (name: string) => errors[`fuels.${one.fuel}.${name}`];
    return (
      <fieldset key={one.fuel} className="grid grid-cols-2 items-start gap-3">
        <legend className="col-span-2 pb-1 font-semibold">{capital(ALTERNATIVE_WORDS[one.fuel])}</legend>
        <Select
          label="Bought by"
          value={one.unit}
          error={error('unit')}
          onChange={(event) => put({ unit: event.target.value, kWh: '' })}
        >
          {FUEL_UNITS[one.fuel].map(({ unit }) => (
            <option key={unit} value={unit}>
              {unit}
            </option>
          ))}
        </Select>
        <NumberField
          label={`Price, ${currency === '' ? 'each' : `${currency} each`}`}
          value={one.price}
          error={error('price')}
          onChange={(event) => put({ price: event.target.value })}
        />
        <NumberField
          label="Energy in it"
          unit="kWh"
          placeholder={published === null ? '' : String(published.kWh)}
          hint={published?.source}
          value={one.kWh}
          error={error('kWh')}
          onChange={(event) => put({ kWh: event.target.value })}
        />
        <NumberField
          label="Becomes heat"
          unit="%"
          hint="Of the boiler or stove; a guess of ours until you know better."
          value={one.efficiency}
          error={error('efficiency')}
          onChange={(event) => put({ efficiency: event.target.value })}
        />
      </fieldset>
    );
  });
}
