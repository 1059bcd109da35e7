/** Money in a report: the rows of the page Money, made here so that both say the same. */
import type { Balance } from '@/lib/analysis/money-balance';
import { count, energy, UNKNOWN } from '@/lib/units/format';
import { money, perKWh } from '@/lib/units/money';
import type { FigureRow } from './duty-figures';
import { ALTERNATIVE_WORDS, moneySentence, type MoneyStanding, whyNoPrice } from './money';
import type { ReportBlock } from './report';

/** Heat, electricity and what both cost. */
export function seasonRows({ totals, fan, own, allIn }: Balance, currency: string): FigureRow[] {
  const { heat, electricity } = totals;
  return [
    {
      name: 'Heat',
      value: energy(heat?.kWh ?? null, 1, heat?.sd),
      note: `of ${count(heat?.nights ?? 0, 'night')}, as on Duty`,
    },
    { name: 'Electricity', value: energy(electricity?.kWh ?? null, 3) },
    {
      name: 'Its cost',
      value: money(electricity === null ? null : fan.micros, currency),
      ...(fan.missing === null ? {} : { note: whyNoPrice(fan.missing) }),
    },
    {
      name: 'Own costs of the season',
      value: money(own, currency),
      ...(own === null ? { note: whyNoPrice('no-costs') } : {}),
    },
    typeof allIn === 'string'
      ? { name: 'A kWh of heat, all in', value: UNKNOWN, note: whyNoPrice(allIn) }
      : {
          name: 'A kWh of heat, all in',
          value: perKWh(allIn.perKWh, currency, allIn.sd),
          note: `19 times in 20 between ${perKWh(allIn.low, currency)} and ${perKWh(allIn.high, currency)}`,
        },
  ];
}

/** Always of the season so far, whatever span is told: a week has no price of its own. */
export function moneyBlock(standing: MoneyStanding): ReportBlock {
  const { balance, currency, season, source } = standing;
  return {
    key: 'money',
    title: `Money: ${source}, season ${season} so far`,
    sentence: moneySentence(standing),
    ...(currency === null
      ? {}
      : {
          rows: [
            ...seasonRows(balance, currency),
            ...balance.alternatives.map(({ kind, perKWh: price, same }) => ({
              name: `The same heat from ${ALTERNATIVE_WORDS[kind]}`,
              value: same === null ? UNKNOWN : money(same.micros, currency, same.sd),
              note: perKWh(price, currency),
            })),
          ],
        }),
  };
}
