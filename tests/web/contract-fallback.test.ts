/** What a node does by itself, and loads that do not do as they are told, at twenty times: from outside, with the yard beside. */
import { describe, expect, it } from 'vitest';
import { listOf } from '../support/outside-api';
import { until } from '../support/until';
import { fastProgram } from './fast-program';

const RATE = 20;
const SLACK = 6;
const fallback = { point: 'bench', below: 2, above: 5, onFor: 1200, offFor: 2400 };
const rest = { longestDraw: 1200, least: 1800 };
const program = fastProgram(RATE, { yard: true });
const open = () => program.open({ points: { amps: { role: 'current', unit: 'A', min: 0, max: 5 } } });

describe('A node that was away', () => {
  it('tells its fallback’s runs at their own times: switchings without a number, drawn credit, and why', async () => {
    const scene = await open();
    await scene.channel(1, 'a', { fallback });
    await scene.rule('a', { rest });
    await scene.join({ can: ['fallback'] });
    await scene.send({ bench: 5, air: 5 });
    const { boot, number } = scene.node;
    const left = scene.now();
    scene.node.terminate();
    await until('its lease is over', () => scene.now() > left + 150, 15_000);

    const [begun, off] = [left + 30, left + 120];
    await scene.join({
      ...{ boot, number, can: ['fallback'] },
      logs: [
        `fallback begun at=${begun}`,
        `fallback on at=${begun} relay=1 why=below point=bench value=1.8`,
        `fallback off at=${off} relay=1 why=above point=bench value=5.1`,
        `fallback ended at=${scene.now()}`,
      ],
    });
    const [on, stopped] = await scene.waitTold(1, 2);
    expect([on, stopped].map((one) => [one?.to, one?.claim, one?.number])).toEqual([
      ['on', 'fail-safe', null],
      ['off', 'fail-safe', null],
    ]);
    expect(on?.at).toBeCloseTo(begun, 2);
    expect(on?.because).toMatchObject({
      fallback: { state: 'on', point: 'bench', value: 1.8, why: 'below' },
    });
    // 90 of 1200 s are spent; what came back since then is at most 1/1800 a second
    await until('its draw is reckoned', async () => Number((await scene.source())['drawnToday']) === 90);
    const { credit } = await scene.source();
    expect(Number(credit)).toBeGreaterThanOrEqual(0.925);
    expect(Number(credit)).toBeLessThan(0.925 + (scene.now() - off + SLACK) / 1800);
    const at = new Date((begun + 50) * 1000).toISOString();
    const why = (await program.api.get(`${scene.at}/channels/1/why?at=${encodeURIComponent(at)}`)).body;
    expect(why).toMatchObject({ state: 'on', claim: 'fail-safe' });
    scene.node.close();
  }, 60_000);

  it('may be the yard’s own: with its server stopped it keeps the house by what it was told', async () => {
    const channel = '/houses/long-house/channels/gate-heap-fan';
    const warm = { ...fallback, point: 'bench-1', below: 60, above: 70 };
    expect((await program.api.call('PATCH', channel, { fallback: warm })).status).toBe(200);
    const log = () => program.app.log('yard');
    await until('it was told', () => log().includes('"LH-1"') && log().includes('"event":"command"'), 15_000);
    const worker = program.app.pid('worker') ?? 0;
    await program.api.call('POST', '/houses/long-house/all-off', {});
    process.kill(worker, 'SIGSTOP');
    await until('it runs by itself', () => /"event":"fallback".*"what":"on"/.test(log()), 15_000);
    process.kill(worker, 'SIGCONT');
    const told = async () =>
      listOf((await program.api.get('/houses/long-house/switchings?channel=gate-heap-fan')).body).filter(
        (one) => one['claim'] === 'fail-safe' && one['number'] === null,
      );
    await until('it is stored', async () => (await told()).some((one) => one['to'] === 'on'), 20_000);
    expect(await program.api.page('/long-house/watch')).toMatch(
      /The field box kept the house by itself from \d\d:\d\d to \d\d:\d\d/,
    );
  }, 60_000);

  it('has a fallback by its own points alone, in °C', async () => {
    const scene = await open();
    await program.api.make(`${scene.at}/nodes`, { key: 'M', kind: 'socket', channels: 2 });
    await program.api.make(`${scene.at}/points`, {
      key: 'far',
      node: 'M',
      name: 'Far',
      role: 'bench',
      unit: 'Cel',
    });
    await scene.channel(1, 'a', { fallback });
    for (const [point, why] of [
      ['far', /does not measure far/],
      ['amps', /temperature/],
      ['nobody', /no point/],
    ] as const) {
      const answer = await program.api.call('PATCH', `${scene.at}/channels/1`, {
        fallback: { ...fallback, point },
      });
      expect(answer.status).toBe(422);
      const [error] = listOf(answer.body, 'errors');
      expect(error?.['path']).toBe('fallback.point');
      expect(error?.['message']).toMatch(why);
    }
  });
});

describe('A fan with a proof that it runs', () => {
  it('counts as standing while it draws no current: alarm, full credit, nothing drawn; and back again', async () => {
    const scene = await open();
    await scene.channel(1, 'a', { runProof: { point: 'amps', above: 0.2 } });
    await scene.rule('a', { rest });
    await scene.join();
    await scene.send({ bench: 3, air: 5 });
    await scene.sendAmps(0);
    await scene.node.coil(1, 'on');
    scene.node.sendRelays();
    await scene.pass(20);
    await scene.sendAmps(0);
    const kinds = async () =>
      listOf((await program.api.get(`${scene.at}/state`)).body, 'alarms').map((one) => one['kind']);
    await until('the alarm stands', async () => (await kinds()).includes('fan-standing'));
    const { drawnToday } = await scene.source();
    await scene.pass(120);
    expect(await scene.source()).toMatchObject({ drawnToday });
    await scene.sendAmps(0.5);
    await until('the alarm is over', async () => !(await kinds()).includes('fan-standing'));
    await scene.pass(40);
    expect(Number((await scene.source())['drawnToday'])).toBeGreaterThan(Number(drawnToday));
    scene.node.close();
  }, 60_000);

  it('that is off and draws current raises an alarm', async () => {
    const scene = await open();
    await scene.channel(1, 'a', { runProof: { point: 'amps', above: 0.2 } });
    await scene.rule('a');
    await scene.join();
    await scene.send({ bench: 5, air: 5 });
    await scene.pass(40);
    await scene.sendAmps(0.5);
    await until('the alarm stands', async () =>
      listOf((await program.api.get(`${scene.at}/state`)).body, 'alarms').some(
        (one) => one['kind'] === 'runs-though-off',
      ),
    );
    expect(scene.node.coils['1']).toBe('off');
    scene.node.close();
  }, 60_000);
});
