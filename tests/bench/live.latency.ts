// p50 and p95, in ms, from a reading sent by a node to the relay commanded, and to the channel's new state painted in Chromium.
import { OutsideApi } from '../support/outside-api';
import { joinNode, makeHouse, pack } from '../support/outside-house';
import { launchBrowser, signedIn } from '../support/browser';
import { quantile, round3, withApp } from './support';

const ROUNDS = 40;
const OWNER = 'owner@larkmoor.example';

declare global {
  interface Window {
    paintedAt: { state: string; at: number }[];
  }
}

export function bench() {
  return withApp({ seed: { nights: 0 } }, async (app) => {
    const api = await OutsideApi.signIn(app.url, OWNER, app.password);
    const house = await makeHouse(api);
    const node = await joinNode(app.url, house);
    await node.readings(pack({ 'bench-1': 5, 'house-air': 5 }));
    const browser = await launchBrowser();
    try {
      const context = await signedIn(browser, app, OWNER);
      const page = await context.newPage();
      await page.goto(`/${house.slug}/watch`);
      await page.waitForSelector('[data-channel="fan-1"][data-state="off"]');
      await page.waitForSelector('[data-link="live"]');
      await page.evaluate(watchPaints);
      const commanded: number[] = [];
      const painted: number[] = [];
      for (let round = 0; round < ROUNDS; round += 1) {
        const wanted = round % 2 === 0 ? 'on' : 'off';
        const sentAt = performance.timeOrigin + performance.now();
        node.sendReadings(pack({ 'bench-1': wanted === 'on' ? 3 : 8 }));
        commanded.push(await node.coil(1, wanted));
        const at = await page.waitForFunction(
          ([state, since]) => window.paintedAt.find((one) => one.state === state && one.at > since)?.at,
          [wanted, sentAt] as const,
        );
        painted.push(Number(await at.jsonValue()) - sentAt);
      }
      node.close();
      return { toCommand: figures(commanded), toPaint: figures(painted), rounds: ROUNDS };
    } finally {
      await browser.close();
    }
  });
}

/** Runs in the page: notes when a frame with a channel's new state had been painted. */
function watchPaints(): void {
  window.paintedAt = [];
  const channel = document.querySelector('[data-channel="fan-1"]');
  if (channel === null) return;
  new MutationObserver(() => {
    const state = channel.getAttribute('data-state') ?? '';
    // the frame that shows it has been painted when the next one begins
    requestAnimationFrame(() =>
      requestAnimationFrame(() =>
        window.paintedAt.push({ state, at: performance.timeOrigin + performance.now() }),
      ),
    );
  }).observe(channel, { attributes: true, attributeFilter: ['data-state'] });
}

function figures(values: number[]) {
  return { p50: round3(quantile(values, 0.5)), p95: round3(quantile(values, 0.95)), raw: values.map(round3) };
}
