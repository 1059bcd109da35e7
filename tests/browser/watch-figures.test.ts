// Watch says of this night and of each channel what the interface tells. Both change meanwhile, so both are read again until
// they were read in the same moment.
import type { BrowserContext, Page } from 'playwright-core';
import { describe, expect, it, vi } from 'vitest';
import { round } from '@/lib/analysis/rounding';
import { count, energy, temperature } from '@/lib/units/format';
import { USUAL } from '@/lib/units/preferences';
import { duration } from '@/lib/units/time';
import { figuresIn, nightsTold, plain, told } from '../support/shown-figures';
import { ownersPages } from './owners-pages';

const AGREE = { timeout: 50_000, interval: 300 };
/** A strip's part is drawn at least a unit wide, which is some two minutes: what is newer cannot be read off it. */
const DRAWN_AFTER_MS = 5 * 60_000;

let owner: BrowserContext;
let page: Page;

ownersPages((opened) => ({ owner, page } = opened));

interface State {
  at: string;
  channels: { number: number; key: string; label: string; state: 'on' | 'off' }[];
  alarms: { id: string }[];
}
const stateOf = (house: string) => told<State>(owner, `/houses/${house}/state`);

/** Each channel's load at the line that marks now, as the strips draw it. */
function drawnNow(): Promise<Record<string, 'on' | 'off'>> {
  return page.evaluate(() => {
    const svg = [...document.querySelectorAll('figure svg')].find((one) => one.checkVisibility());
    const now = Number(svg?.querySelector('line.stroke-ink')?.getAttribute('x1'));
    const strips = [...(svg?.querySelectorAll(':scope > g') ?? [])].flatMap((group) => {
      const name = group.querySelector('text.fill-ink')?.textContent ?? null;
      const parts = [...group.querySelectorAll('rect')];
      if (name === null || group.querySelector('line.stroke-line') === null) return [];
      const last = parts.find((part) => {
        const [x, width] = [Number(part.getAttribute('x')), Number(part.getAttribute('width'))];
        return x < now && x + width > now - 1;
      });
      const runs = last?.getAttribute('class')?.startsWith('fill-ember') === true;
      return [[name, runs ? 'on' : 'off'] as const];
    });
    return Object.fromEntries(strips);
  });
}

describe.each([
  ['long-house', 'Gate heap', 'gate-heap'],
  ['long-house', 'Ground tubes', 'ground-tubes'],
  ['prop-house', 'Yew heap', 'yew-heap'],
])('This night so far in %s, of the source %s', (house, name, source) => {
  it('is on Watch what the interface tells', async () => {
    await vi.waitFor(async () => {
      await page.goto(`/${house}/watch`);
      const shown = await figuresIn(page, /^This night so far$/);
      const all = await nightsTold(owner, house);
      const tonight = all.filter((night) => night.night === all.at(-1)?.night);
      const own = tonight.find((night) => night.source === source);
      if (own === undefined) throw new Error('no night is told');
      const places = Math.abs(own.heat?.kWh ?? 1) < 1 ? 2 : 1;
      const heat = energy(own.heat?.kWh ?? null, places, own.onSeconds === 0 ? null : own.heat?.sd);
      // every source of a house tells the same lowest of it
      const { lowest } = own;
      // nights are told to 0.1 Wh: their sum is rounded once, where it is shown, and not row by row before
      const electricity = tonight.reduce((sum, night) => sum + (night.electricity?.kWh ?? 0), 0);
      expect(shown).toMatchObject({
        [`Heat from ${name}`]: plain(heat),
        [`${name} ran`]: plain(`${duration(own.onSeconds)} ${count(own.starts, 'start')}`),
        'Electricity for it': plain(energy(round(electricity, 4), 3)),
        'Lowest in the house':
          lowest === null
            ? 'not known'
            : plain(`${temperature(lowest.value, USUAL)}, ${lowest.at.slice(11, 16)}`),
      });
    }, AGREE);
  });
});

describe.each(['long-house', 'prop-house'])('How %s stands', (house) => {
  it('is on Watch, channel for channel, what the interface tells', async () => {
    await page.goto(`/${house}/watch`);
    await page.waitForSelector('[data-link="live"]');
    await vi.waitFor(async () => {
      const { channels } = await stateOf(house);
      const shown = await page
        .locator('[data-channel]')
        .evaluateAll((rows) => rows.map((row) => [row.dataset['channel'], row.dataset['state']]));
      expect(shown).toEqual(channels.map(({ key, state }) => [key, state]));
      expect(shown.length).toBeGreaterThan(2);
    }, AGREE);
  });

  it('is where its strips end', async () => {
    await vi.waitFor(async () => {
      await page.goto(`/${house}/watch`);
      const drawn = await drawnNow();
      const state = await stateOf(house);
      const { items } = await told<{ items: { at: string; channel: number }[] }>(
        owner,
        `/houses/${house}/switchings?limit=100`,
      );
      const calm = state.channels.filter(({ number }) =>
        items.every(
          (one) => one.channel !== number || Date.parse(state.at) - Date.parse(one.at) > DRAWN_AFTER_MS,
        ),
      );
      expect(Object.keys(drawn)).toEqual(state.channels.map(({ label }) => label));
      expect(calm.length).toBeGreaterThan(0);
      expect(calm.map(({ label }) => [label, drawn[label]])).toEqual(
        calm.map(({ label, state: is }) => [label, is]),
      );
    }, AGREE);
  });
});
