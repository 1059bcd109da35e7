/** Rest, credit and least times at twenty times, from outside; the times are worked out from control.md on paper. */
import { describe, expect, it } from 'vitest';
import { fastProgram, nearWithin } from './fast-program';

const RATE = 20;
/** A step is taken late by some real milliseconds, each of which is RATE of app time. */
const SLACK = 4;
const { open } = fastProgram(RATE);
const near = nearWithin(SLACK);

describe.concurrent('Rest and draw credit, in times worked out on paper', () => {
  it('spends one credit by two fans at the sum of their rates, and gives it back after the least rest', async () => {
    const scene = await open();
    await scene.channel(1, 'a');
    await scene.channel(2, 'b');
    await scene.rule('a', { rest: { longestDraw: 120, least: 60 } });
    await scene.rule('b', { rest: { longestDraw: 60, least: 40 } });
    await scene.join();
    await scene.send({ bench: 3, air: 5 });
    // 1/120 + 1/60 = 1/40 a second: both stop after 40 s, and rest for the larger least
    const [on, off, again] = await scene.waitTold(1, 3);
    const [, off2] = await scene.waitTold(2, 3);
    near((off?.at ?? 0) - (on?.at ?? 0), 40);
    near((off2?.at ?? 0) - (on?.at ?? 0), 40);
    near((again?.at ?? 0) - (off?.at ?? 0), 60);
    expect([off?.claim, off2?.claim, again?.claim]).toEqual(['rest', 'rest', 'band']);
    scene.node.close();
  });

  it('does not start until the credit is worth the least on time', async () => {
    const scene = await open();
    await scene.channel(1, 'a', { minOn: 50 });
    await scene.rule('a', { rest: { longestDraw: 100, least: 100 } });
    await scene.join();
    const begun = await scene.send({ bench: 3, air: 5 });
    await scene.waitTold(1, 1);
    await scene.pass(60 - (scene.now() - begun));
    // long enough that it is not over before anybody heard of it: a second of app time is 50 ms here
    await scene.hand(1, { state: 'off', seconds: 8 });
    const [on, off, again] = await scene.waitTold(1, 3);
    expect(off?.claim).toBe('hand');
    // drawn d seconds leaves 1 - d/100; a start needs 50/100, and 1/100 a second comes back
    const drawn = (off?.at ?? 0) - (on?.at ?? 0);
    near((again?.at ?? 0) - (off?.at ?? 0), drawn - 50);
    scene.node.close();
  });

  it('starts the rest anew after a draw by hand within it', async () => {
    const scene = await open();
    await scene.channel(1, 'a');
    await scene.rule('a', { rest: { longestDraw: 20, least: 60 } });
    await scene.join();
    await scene.send({ bench: 3, air: 5 });
    await scene.waitTold(1, 2);
    await scene.pass(30);
    await scene.hand(1, { state: 'on', seconds: 10 });
    const told = await scene.waitTold(1, 5);
    expect(told.map(({ to, claim }) => `${to} ${claim}`)).toEqual([
      'on band',
      'off rest',
      'on hand',
      'off rest',
      'on band',
    ]);
    near((told[4]?.at ?? 0) - (told[3]?.at ?? 0), 60);
    scene.node.close();
  });

  it('waits for the recovery level, to most while it does not come, and ends as soon as it does', async () => {
    const scene = await open();
    await scene.channel(1, 'a');
    const rest = { longestDraw: 20, least: 30, most: 90, until: { point: 'core', level: 43 } };
    await scene.rule('a', { rest });
    await scene.join();
    await scene.send({ bench: 3, air: 5, core: 40 });
    let told = await scene.waitTold(1, 3);
    near((told[2]?.at ?? 0) - (told[1]?.at ?? 0), 90);
    told = await scene.waitTold(1, 4);
    await scene.pass(50);
    expect(await scene.state(1)).toMatchObject({ claim: 'rest', state: 'off' });
    const level = await scene.send({ core: 43 });
    told = await scene.waitTold(1, 5);
    near((told[4]?.at ?? 0) - level, 0);
    told = await scene.waitTold(1, 7);
    near((told[6]?.at ?? 0) - (told[5]?.at ?? 0), 30);
    scene.node.close();
  });

  it('ends a draw that brings no gain, after its wait and two minutes, and rests', async () => {
    const scene = await open();
    await scene.channel(1, 'a');
    const leastGain = { kelvin: 3, after: 20, intake: 'intake', return: 'back' };
    await scene.rule('a', { rest: { longestDraw: 2000, least: 100, leastGain } });
    await scene.join();
    await scene.send({ bench: 3, air: 5, intake: 5, back: 7 });
    const [on, off] = await scene.waitTold(1, 2, 14_000);
    near((off?.at ?? 0) - (on?.at ?? 0), 140);
    expect(off?.claim).toBe('rest');
    await scene.claim(1, 'rest');
    expect(await scene.source()).toMatchObject({ credit: 0 });
    scene.node.close();
  });

  it('holds the least on and off times against the band, and lets hand off break the least on', async () => {
    const scene = await open();
    await scene.channel(1, 'a', { minOn: 60, minOff: 40 });
    await scene.rule('a');
    await scene.join();
    await scene.send({ bench: 3, air: 5 });
    await scene.waitTold(1, 1);
    await scene.send({ bench: 9 });
    await scene.claim(1, 'short-cycle');
    let told = await scene.waitTold(1, 2);
    near((told[1]?.at ?? 0) - (told[0]?.at ?? 0), 60);
    await scene.send({ bench: 3 });
    await scene.claim(1, 'short-cycle');
    told = await scene.waitTold(1, 3);
    near((told[2]?.at ?? 0) - (told[1]?.at ?? 0), 40);
    // shorter than the least off, long enough to be heard by a machine that has much else to do
    await scene.hand(1, { state: 'off', seconds: 30 });
    told = await scene.waitTold(1, 4);
    expect((told[3]?.at ?? 0) - (told[2]?.at ?? 0)).toBeLessThan(50);
    told = await scene.waitTold(1, 5);
    near((told[4]?.at ?? 0) - (told[3]?.at ?? 0), 40);
    scene.node.close();
  });

  it('spends the daily limit by the channel-seconds of both fans, and frost breaks it', async () => {
    const scene = await open({ source: { dailyLimit: 60 } });
    await scene.channel(1, 'a');
    await scene.channel(2, 'b');
    await scene.rule('a');
    await scene.rule('b');
    await scene.join();
    await scene.send({ bench: 3, air: 5 });
    const [on, off] = await scene.waitTold(1, 2);
    near((off?.at ?? 0) - (on?.at ?? 0), 30);
    expect(off?.claim).toBe('rest');
    expect(Math.abs(Number((await scene.source())['drawnToday']) - 60)).toBeLessThan(2 * SLACK);
    await scene.send({ air: 0.9 });
    await scene.claim(1, 'frost');
    scene.node.close();
  });
});
