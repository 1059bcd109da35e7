/** Frost, interlocks and limits at twenty times, from outside. */
import { describe, expect, it } from 'vitest';
import { fastProgram, nearWithin } from './fast-program';

const RATE = 20;
const SLACK = 4;
const program = fastProgram(RATE);
const { open } = program;
const near = nearWithin(SLACK);

describe.concurrent('Frost', () => {
  it('begins under the limit, not at it, and ends 1 K above', async () => {
    const scene = await open();
    await scene.channel(1, 'a');
    await scene.channel(2, 'no-help', { frostHelp: false });
    await scene.rule('a', { season: { from: '06-01', to: '06-02' } });
    await scene.join();
    await scene.send({ bench: 3, air: 1 });
    await scene.pass(5);
    expect(await scene.state(1)).toMatchObject({ state: 'off', claim: 'idle' });
    await scene.send({ air: 0.99 });
    await scene.claim(1, 'frost');
    expect(scene.node.coils).toMatchObject({ 1: 'on', 2: 'off' });
    await scene.send({ air: 1.9 });
    await scene.pass(5);
    expect(await scene.state(1)).toMatchObject({ state: 'on', claim: 'frost' });
    await scene.send({ air: 2.1 });
    await scene.claim(1, 'idle');
    await scene.node.coil(1, 'off');
    scene.node.close();
  });

  it('breaks a rest unless the rule forbids it, and holds the credit at zero', async () => {
    const scene = await open();
    await scene.channel(1, 'a');
    await scene.rule('a', { rest: { longestDraw: 20, least: 2000 } });
    await scene.join();
    await scene.send({ bench: 3, air: 5 });
    await scene.waitTold(1, 2);
    await scene.send({ air: 0 });
    await scene.claim(1, 'frost');
    await scene.node.coil(1, 'on');
    await scene.pass(10);
    expect(await scene.source()).toMatchObject({ credit: 0 });
    scene.node.close();

    const strict = await open();
    await strict.channel(1, 'a');
    await strict.rule('a', { rest: { longestDraw: 20, least: 2000, frostMayBreak: false } });
    await strict.join();
    await strict.send({ bench: 3, air: 5 });
    await strict.waitTold(1, 2);
    await strict.send({ air: 0 });
    await strict.pass(10);
    expect(await strict.state(1)).toMatchObject({ state: 'off', claim: 'rest' });
    strict.node.close();
  });

  it('never breaks the core floor, which 1 K above lets a draw begin again', async () => {
    const scene = await open({ source: { coreFloor: 38 } });
    await scene.channel(1, 'a');
    await scene.rule('a');
    await scene.join();
    await scene.send({ core: 37.9, bench: 3, air: 0 });
    await scene.claim(1, 'source-guard');
    expect(scene.node.coils['1']).toBe('off');
    await scene.send({ core: 38.9 });
    await scene.pass(5);
    expect(await scene.state(1)).toMatchObject({ state: 'off', claim: 'source-guard' });
    await scene.send({ core: 39.1 });
    await scene.claim(1, 'frost');
    await scene.hand(1, { state: 'on', seconds: 60 });
    await scene.send({ core: 30 });
    await scene.pass(5);
    expect(await scene.state(1)).toMatchObject({ state: 'on', claim: 'hand' });
    scene.node.close();
  });

  it('turns a cooling vent off, and answers a changed limit at once', async () => {
    const scene = await open();
    await scene.channel(1, 'vent', { load: { kind: 'vent' }, source: null, frostHelp: false });
    await scene.rule('vent', { purpose: 'cool', band: [{ from: '00:00', low: 1, high: 2 }] });
    await scene.join();
    await scene.send({ bench: 5, air: 6 });
    await scene.claim(1, 'band');
    await program.api.call('PATCH', scene.at, { frostLimit: 7 });
    await scene.claim(1, 'frost');
    await scene.node.coil(1, 'off');
    scene.node.close();
  });
});

describe.concurrent('Interlocks and limits', () => {
  it('never lets vent and fan run together; the second starts its delay after the first is off', async () => {
    const scene = await open();
    await scene.channel(1, 'fan');
    await scene.channel(2, 'vent', { load: { kind: 'vent' }, source: null, frostHelp: false });
    await program.api.make(`${scene.at}/interlocks`, {
      channel: 'vent',
      kind: 'never-with',
      other: 'fan',
      delay: 30,
    });
    await scene.rule('fan');
    await scene.join();
    await scene.hand(2, { state: 'on', seconds: 600 });
    await scene.node.coil(2, 'on');
    await scene.send({ bench: 3, air: 5 });
    await scene.claim(1, 'interlock');
    await scene.auto(2);
    const [, vent] = await scene.waitTold(2, 2);
    const [fan] = await scene.waitTold(1, 1);
    near((fan?.at ?? 0) - (vent?.at ?? 0), 30);
    await scene.hand(2, { state: 'on', seconds: 600 });
    const [, fanOff] = await scene.waitTold(1, 2);
    const told = await scene.waitTold(2, 3);
    expect(fanOff?.claim).toBe('interlock');
    near((told[2]?.at ?? 0) - (fanOff?.at ?? 0), 30);
    scene.node.close();
  });

  it('runs a channel only with the one it needs, which waits for it to go off first', async () => {
    const scene = await open();
    await scene.channel(1, 'pump', { source: null, frostHelp: false });
    await scene.channel(2, 'fan');
    await program.api.make(`${scene.at}/interlocks`, {
      channel: 'fan',
      kind: 'needs',
      other: 'pump',
      delay: 20,
    });
    await scene.join();
    await scene.hand(2, { state: 'on', seconds: 3000 });
    await scene.claim(2, 'interlock');
    await scene.hand(1, { state: 'on', seconds: 3000 });
    const [pump] = await scene.waitTold(1, 1);
    const [fan] = await scene.waitTold(2, 1);
    near((fan?.at ?? 0) - (pump?.at ?? 0), 20);
    await scene.auto(1);
    const [, fanOff] = await scene.waitTold(2, 2);
    const [, pumpOff] = await scene.waitTold(1, 2);
    expect(pumpOff?.at ?? 0).toBeGreaterThan(fanOff?.at ?? 0);
    scene.node.close();
  });

  it('stops a heater over its high limit, hand or no hand, and takes 1 K to begin again', async () => {
    const scene = await open();
    const mat = { load: { kind: 'heater' }, source: null, frostHelp: false };
    await scene.channel(1, 'mat', { ...mat, highLimit: { point: 'bench', above: 20 } });
    await scene.join();
    await scene.send({ bench: 20, air: 15 });
    await scene.hand(1, { state: 'on', seconds: 3600 });
    await scene.node.coil(1, 'on');
    await scene.send({ bench: 20.1 });
    await scene.claim(1, 'limit');
    await scene.node.coil(1, 'off');
    await scene.send({ bench: 19.1 });
    await scene.pass(3);
    expect(await scene.state(1)).toMatchObject({ state: 'off', claim: 'limit' });
    await scene.send({ bench: 18.9 });
    await scene.pass(5);
    // the limit ended the hand on
    expect(await scene.state(1)).toMatchObject({ state: 'off', claim: 'idle', mode: 'auto' });
    scene.node.close();
  });

  it('stops what has run for its longest time, for the least off time at least, and ends a hand on', async () => {
    const scene = await open();
    await scene.channel(1, 'lamp', { load: { kind: 'lamp' }, source: null, longestOn: 40, minOff: 20 });
    await scene.join();
    await scene.send({ bench: 5, air: 5 });
    await scene.hand(1, { state: 'on', seconds: 600 });
    const [on, off] = await scene.waitTold(1, 2);
    near((off?.at ?? 0) - (on?.at ?? 0), 40);
    expect(off?.claim).toBe('limit');
    await scene.pass(25);
    expect(await scene.state(1)).toMatchObject({ state: 'off', mode: 'auto' });
    scene.node.close();
  });
});
