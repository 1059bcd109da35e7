/** Half hours of control.md, at forty times: a hand on whose point dies, and a frost that nobody can measure any more. */
import { describe, expect, it } from 'vitest';
import { fastProgram, nearWithin } from './fast-program';

const RATE = 40;
/** Long enough for orders to be given on a busy machine before the point is silent. */
const STALE = 400;
const program = fastProgram(RATE);
const { open } = program;
const near = nearWithin(8);

describe.concurrent('Half an hour', () => {
  it('is what a hand on runs whose point died; a heater not at all', async () => {
    const scene = await open({ points: { bench: { staleAfter: STALE } } });
    await scene.channel(1, 'fan');
    await scene.rule('fan');
    const mat = { load: { kind: 'heater' }, source: null, frostHelp: false };
    await scene.channel(2, 'mat', mat);
    await scene.rule('mat');
    await scene.join();
    const at = await scene.send({ bench: 9, air: 9 });
    await scene.hand(1, { state: 'on', seconds: 20_000 });
    await scene.hand(2, { state: 'on', seconds: 3600 });
    const [, matOff] = await scene.waitTold(2, 2, 30_000);
    near((matOff?.at ?? 0) - at, STALE);
    const [, fanOff] = await scene.waitTold(1, 2, 60_000);
    near((fanOff?.at ?? 0) - at, STALE + 1800);
    scene.node.close();
  }, 80_000);

  it('is what a frost is held that nobody can measure any more, with an alarm', async () => {
    const scene = await open({ points: { bench: { staleAfter: STALE }, air: { staleAfter: STALE } } });
    await scene.channel(1, 'fan');
    await scene.join();
    const at = await scene.send({ bench: 0.5, air: 0.4 });
    await scene.claim(1, 'frost');
    await scene.pass(STALE + 40);
    expect(await scene.state(1)).toMatchObject({ claim: 'frost', state: 'on' });
    const alarms = (await program.api.get(`${scene.at}/alarms`)).body['items'] as { kind: string }[];
    expect(alarms.map(({ kind }) => kind)).toContain('frost-without-reading');
    const [, off] = await scene.waitTold(1, 2, 60_000);
    near((off?.at ?? 0) - at, STALE + 1800);
    scene.node.close();
  }, 80_000);
});
