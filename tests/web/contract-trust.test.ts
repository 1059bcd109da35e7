/** Calendar and distrusted readings at twenty times, from outside. */
import { describe, expect, it } from 'vitest';
import { until } from '../support/until';
import { fastProgram, nearWithin } from './fast-program';

const RATE = 20;
const SLACK = 4;
const program = fastProgram(RATE);
const { open } = program;
const near = nearWithin(SLACK);

const clock = (seconds: number) => new Date(seconds * 1000).toISOString().slice(11, 16);

describe.concurrent('Calendar', () => {
  it('keeps hours across midnight to the minute, and the season by the day', async () => {
    const scene = await open();
    await scene.channel(1, 'a');
    await scene.channel(2, 'b');
    await scene.join();
    await scene.send({ bench: 3, air: 5 });
    const from = Math.ceil(scene.now() / 60) * 60 + 60;
    // longer than any hour that begins and ends on one day: over midnight at least once
    const hours = { from: clock(from), to: clock(from - 7200) };
    await scene.rule('a', { hours });
    const today = new Date(scene.now() * 1000).toISOString().slice(5, 10);
    await scene.rule('b', {
      season: { from: today, to: today },
      hours: { from: clock(from - 600), to: clock(from) },
    });
    expect(await scene.state(1)).toMatchObject({ state: 'off' });
    const [on] = await scene.waitTold(1, 1);
    near((on?.at ?? 0) - from, 0);
    const [onB, offB] = await scene.waitTold(2, 2);
    expect([onB?.to, offB?.to, offB?.claim]).toEqual(['on', 'off', 'idle']);
    near((offB?.at ?? 0) - from, 0);
    scene.node.close();
  });

  it('moves low and high at the time of a new period', async () => {
    const scene = await open();
    await scene.channel(1, 'a');
    await scene.join();
    await scene.send({ bench: 5, air: 5 });
    const from = Math.ceil(scene.now() / 60) * 60 + 60;
    const later = { from: clock(from), low: 6, high: 8 };
    await scene.rule('a', { band: [{ from: clock(from - 7200), low: 2, high: 4 }, later] });
    const [on] = await scene.waitTold(1, 1);
    near((on?.at ?? 0) - from, 0);
    scene.node.close();
  });
});

describe.concurrent('Readings that cannot be trusted', () => {
  it('goes to the stand-in with its offset when the point is silent, and back after three good readings', async () => {
    const scene = await open({ points: { bench: { staleAfter: 20 } } });
    await scene.channel(1, 'a');
    await scene.rule('a', { standIns: [{ point: 'air', offset: -0.5 }] });
    await scene.join();
    const t = await scene.send({ bench: 5, air: 4.4 });
    const [on] = await scene.waitTold(1, 1);
    near((on?.at ?? 0) - t, 20);
    expect(on?.claim).toBe('band');
    for (const value of [8, 8.1]) await scene.send({ bench: value });
    await scene.pass(2);
    expect(scene.node.coils['1']).toBe('on');
    await scene.send({ bench: 8.2 });
    await scene.node.coil(1, 'off');
    scene.node.close();
  });

  it('does not use −127 or 85.0 of a one-wire point: one leaves the last good value, two drop its quality', async () => {
    const scene = await open({ points: { bench: { sensor: 'one-wire', min: -200, max: 200 } } });
    await scene.channel(1, 'a');
    await scene.rule('a');
    await scene.join();
    await scene.send({ bench: 5, air: 5 });
    const bench = async () =>
      ((await program.api.get(`${scene.at}/state`)).body['points'] as Record<string, unknown>[]).find(
        ({ key }) => key === 'bench',
      );
    await scene.send({ bench: -127 });
    await scene.pass(4);
    expect(await bench()).toMatchObject({ quality: 'good', value: 5 });
    await scene.send({ bench: 85 });
    await until('its quality is dropped', async () => (await bench())?.['quality'] === 'bad');
    expect(scene.node.coils['1']).toBe('off');
    await scene.claim(1, 'fail-safe');
    for (const value of [3, 3.1, 3.2]) await scene.send({ bench: value });
    await scene.claim(1, 'band');
    const raw = await program.api.get(`${scene.at}/readings?points=bench`);
    expect(raw.body).toMatchObject({ points: { bench: { value: [5, -127, 85, 3, 3.1, 3.2] } } });
    scene.node.close();
  });

  it('calls a jump faster than the greatest rate uncertain, then bad after ten minutes', async () => {
    const scene = await open({ points: { bench: { maxRate: 0.5 } } });
    await scene.channel(1, 'a');
    await scene.rule('a');
    await scene.join();
    await scene.send({ bench: 5, air: 5 });
    for (let n = 0; n < 2; n++) {
      await scene.pass(1);
      await scene.send({ bench: -60 + n * 30 });
    }
    const jumped = scene.now();
    await scene.pass(3);
    expect(await scene.state(1)).toMatchObject({ state: 'off', claim: 'idle' });
    await scene.claim(1, 'fail-safe', 35_000);
    // seen by asking, so later by a round of questions; never earlier than the two clocks differ
    expect(scene.now() - jumped).toBeGreaterThan(600 - SLACK);
    expect(scene.now() - jumped).toBeLessThan(600 + 3 * SLACK);
    scene.node.close();
  }, 60_000);
});
