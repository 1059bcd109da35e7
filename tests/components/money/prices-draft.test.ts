import { expect, it } from 'vitest';
import { bodyOfPrices, draftOf } from '@/components/money/prices-draft';
import { readReportAddress, reportHref } from '@/components/reports/address';
import type { MoneyBook } from '@/lib/schema/money';
import { SECTIONS } from '@/lib/schema/report';

const book: MoneyBook = {
  revision: 3,
  currency: 'EUR',
  tariffs: [
    {
      from: '2026-01-01',
      price: '0.2875',
      bands: [{ from: '22:00', to: '06:00', days: 'weekdays', price: '0.21' }],
    },
  ],
  fuels: [{ fuel: 'wood', unit: 'stere', price: '95', kWh: 1650.5, efficiency: 0.725 }],
};

it('prices go through the form without a change, and a fuel without a price is not sent', () => {
  const told = bodyOfPrices(draftOf(book), 3);
  expect(told).toEqual({ ok: true, body: book });
});
it('what is typed with a comma is read, and a code in small letters', () => {
  const draft = draftOf(book);
  const [tariff] = draft.tariffs;
  if (tariff !== undefined) tariff.price = ' 0,3 ';
  draft.currency = 'gbp';
  const told = bodyOfPrices(draft, 3);
  expect(told.ok && [told.body.tariffs[0]?.price, told.body.currency]).toEqual(['0.3', 'GBP']);
});
it('what is wrong with a fuel is told at that fuel, whichever others have a price', () => {
  const draft = draftOf(book);
  for (const fuel of draft.fuels) if (fuel.fuel === 'wood') fuel.efficiency = 'much';
  const told = bodyOfPrices(draft, 3);
  expect(told.ok ? [] : Object.keys(told.fields)).toEqual(['fuels.wood.efficiency']);
});
it('a report’s address says what it is of, and none of its sections means all', () => {
  const address = {
    ...{ span: 'month' as const, night: '2026-11-26', isOfAll: true },
    sections: ['alarms' as const, 'book' as const],
  };
  expect(reportHref('long-house', address)).toBe(
    '/long-house/reports?span=month&of=all&night=2026-11-26&section=alarms&section=book',
  );
  expect(readReportAddress({ span: 'month', section: ['alarms', 'book', 'x'] })).toEqual({
    ...{ span: 'month', night: undefined, sections: ['book', 'alarms'], isOfAll: false },
  });
  expect(readReportAddress({ span: 'decade' })).toEqual({
    span: 'week',
    night: undefined,
    sections: [...SECTIONS],
    isOfAll: false,
  });
});
