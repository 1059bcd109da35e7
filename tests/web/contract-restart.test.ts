/** What a killed worker must find again: rest, least times, hand, frost and limits. */
import { describe, expect, it } from 'vitest';
import { until } from '../support/until';
import type { Scene } from './contract-scene';
import { fastProgram, nearWithin } from './fast-program';

const RATE = 20;
const program = fastProgram(RATE);
const { open } = program;
const near = nearWithin(4);

/** Kills the worker and joins again as soon as another leads. */
async function killed(scenes: Scene[]): Promise<void> {
  const pid = program.app.pid('worker');
  if (pid === null) throw new Error('no worker runs');
  process.kill(pid, 'SIGKILL');
  await until('the lines are cut', () => scenes.every(({ node }) => node.closed !== undefined));
  for (const { node } of scenes) node.terminate();
  await Promise.all(scenes.map((scene) => scene.join()));
}

describe('A worker killed with SIGKILL', () => {
  it('takes up rest, hand, least off, frost and daily limit where they stood', async () => {
    const rest = await open();
    await rest.channel(1, 'a');
    await rest.rule('a', { rest: { longestDraw: 20, least: 400 } });
    const hand = await open();
    await hand.channel(1, 'a');
    await hand.channel(2, 'b');
    const off = await open();
    await off.channel(1, 'a', { minOff: 400 });
    await off.rule('a');
    const frost = await open();
    await frost.channel(1, 'a');
    const daily = await open({ source: { dailyLimit: 60 } });
    await daily.channel(1, 'a');
    await daily.rule('a');
    const scenes = [rest, hand, off, frost, daily];
    for (const scene of scenes) await scene.join();
    await rest.send({ bench: 3, air: 5 });
    await hand.send({ bench: 5, air: 5 });
    const given = await hand.hand(1, { state: 'on', seconds: 400 });
    await hand.hand(2, { state: 'off', seconds: 4000, holdInFrost: true });
    await off.send({ bench: 3, air: 5 });
    await off.waitTold(1, 1);
    await off.send({ bench: 9 });
    await off.waitTold(1, 2);
    await off.send({ bench: 3 });
    await frost.send({ bench: 5, air: 0.5 });
    await frost.claim(1, 'frost');
    await frost.send({ air: 1.5 });
    await daily.send({ bench: 3, air: 5 });
    await daily.claim(1, 'rest');
    await rest.claim(1, 'rest');
    const restUntil = (await rest.source())['restUntil'];
    await killed(scenes);

    await rest.claim(1, 'rest');
    near(Date.parse(String((await rest.source())['restUntil'])) / 1000, Date.parse(String(restUntil)) / 1000);
    expect(await hand.state(1)).toMatchObject({ mode: 'hand', state: 'on' });
    await hand.node.coil(1, 'on');
    expect(await hand.state(2)).toMatchObject({ mode: 'hand', because: { holdInFrost: true } });
    // between the limit and 1 K above it: only a frost that was kept is one
    await frost.claim(1, 'frost');
    await frost.node.coil(1, 'on');
    await daily.claim(1, 'rest');
    await off.claim(1, 'short-cycle');
    const told = await off.waitTold(1, 3, 25_000);
    near((told[2]?.at ?? 0) - (told[1]?.at ?? 0), 400);
    const hands = (await hand.waitTold(1, 2, 25_000)).filter(({ claim }) => claim !== 'fail-safe');
    near(hands.at(-1)?.at ?? 0, Date.parse(String(given['until'])) / 1000);
    const rested = await rest.waitTold(1, 3, 25_000);
    near(rested.at(-1)?.at ?? 0, Date.parse(String(restUntil)) / 1000);
    for (const { node } of scenes) node.close();
  }, 90_000);
});
