import { Button } from '@/components/ui/button';
import { NumberField, Select, TextField } from '@/components/ui/field';
import { DAYS } from '@/lib/schema/money';
import type { BandDraft, TariffDraft } from './prices-draft';

const DAY_WORDS = { all: 'every day', weekdays: 'Mon to Fri', weekend: 'Sat and Sun' };

/** Tariffs of electricity, each from a day on, with other prices for some hours. */
export function TariffFields({
  tariffs,
  currency,
  today,
  errors,
  onChange,
}: {
  tariffs: readonly TariffDraft[];
  currency: string;
  today: string;
  errors: Record<string, string>;
  onChange: (tariffs: TariffDraft[]) => void;
}) {
  const put = (at: number, change: Partial<TariffDraft>) =>
    onChange(tariffs.map((one, i) => (i === at ? { ...one, ...change } : one)));
  const putBand = (at: number, band: number, change: Partial<BandDraft>) =>
    put(at, {
      bands: (tariffs[at]?.bands ?? []).map((one, i) => (i === band ? { ...one, ...change } : one)),
    });
  const unit = currency === '' ? 'a kWh' : `${currency}/kWh`;
  return (
    <div className="flex flex-col gap-3">
      <h3 className="font-semibold">Electricity</h3>
      {tariffs.map((tariff, at) => (
        <fieldset key={at} className="flex flex-col gap-3 rounded-lg border border-line p-3">
          <legend className="px-1 text-[0.9rem] text-soft">Tariff {at + 1}</legend>
          <div className="grid grid-cols-2 items-start gap-3">
            <TextField
              label="From the day"
              type="date"
              value={tariff.from}
              error={errors[`tariffs.${at}.from`]}
              onChange={(event) => put(at, { from: event.target.value })}
            />
            <NumberField
              label={`Price, ${unit}`}
              value={tariff.price}
              error={errors[`tariffs.${at}.price`]}
              onChange={(event) => put(at, { price: event.target.value })}
            />
          </div>
          {tariff.bands.map((band, i) => (
            <div key={i} className="grid grid-cols-2 items-start gap-3 border-t border-faint pt-2">
              {(['from', 'to'] as const).map((end) => (
                <TextField
                  key={end}
                  label={end === 'from' ? 'Hours from' : 'until'}
                  type="time"
                  value={band[end]}
                  error={errors[`tariffs.${at}.bands.${i}.${end}`]}
                  onChange={(event) => putBand(at, i, { [end]: event.target.value })}
                />
              ))}
              <Select
                label="On"
                value={band.days}
                onChange={(event) => putBand(at, i, { days: event.target.value })}
              >
                {DAYS.map((days) => (
                  <option key={days} value={days}>
                    {DAY_WORDS[days]}
                  </option>
                ))}
              </Select>
              <NumberField
                label={`Price, ${unit}`}
                value={band.price}
                error={errors[`tariffs.${at}.bands.${i}.price`]}
                onChange={(event) => putBand(at, i, { price: event.target.value })}
              />
              <Button
                className="col-span-2 justify-self-start"
                onClick={() => put(at, { bands: tariff.bands.filter((_, other) => other !== i) })}
              >
                Take these hours out
              </Button>
            </div>
          ))}
          <div className="flex flex-wrap gap-2">
            <Button
              onClick={() =>
                put(at, { bands: [...tariff.bands, { from: '22:00', to: '06:00', days: 'all', price: '' }] })
              }
            >
              Other hours …
            </Button>
            <Button onClick={() => onChange(tariffs.filter((_, other) => other !== at))}>
              Take tariff {at + 1} out
            </Button>
          </div>
        </fieldset>
      ))}
      {errors['tariffs'] === undefined ? null : (
        <p className="font-semibold text-alarm">{errors['tariffs']}</p>
      )}
      <Button
        className="self-start"
        onClick={() => onChange([...tariffs, { from: today, price: '', bands: [] }])}
      >
        A tariff …
      </Button>
    </div>
  );
}
