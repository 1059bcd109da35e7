/** One house in trouble, and a node that says nothing: neither is anybody else's business. */
import { sql } from 'drizzle-orm';
import { WebSocket } from 'ws';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { closePools } from '@/db/client';
import { touchPlan } from '@/db/queries/plan';
import { force, makeScene, pack, rows, switchings, type Scene } from '../support/field-scene';
import { OutsideNode } from '../support/outside-node';
import { ownWorker, type OwnWorker } from '../support/own-worker';
import { until } from '../support/until';

/** Lines are watched in real time; the worker's own clock runs so many times as fast here. */
const HURRY = 10;
let worker: OwnWorker;
beforeAll(async () => {
  worker = await ownWorker(true, undefined, 1, HURRY);
});
afterAll(async () => {
  await worker.stop();
  await closePools();
});

const alarms = (scene: Scene) =>
  rows<{ kind: string; cleared: boolean }>(
    scene,
    sql`select kind, cleared_at is not null as cleared from alarm where house_id = ${scene.houseId} and kind = 'control-not-running'`,
  );

/** A body that no form or route lets through, and that the core cannot run. */
async function poison({ holding, houseId }: Scene): Promise<void> {
  await holding.db.execute(
    sql`update rule_version set body = body - 'band' where rule_id in (select id from rule where house_id = ${houseId})`,
  );
  await touchPlan(holding, houseId);
}

describe('A house whose step fails', () => {
  it('is commanded no more, under alarm, while the others miss nothing; and is driven again once it is mended', async () => {
    const [ill, well] = [await makeScene(), await makeScene()];
    const [illNode, wellNode] = [
      await OutsideNode.connect(worker.url, ill.token, 'N-1', 4),
      await OutsideNode.connect(worker.url, well.token, 'N-1', 4),
    ];
    await illNode.readings(pack({ 'bench-1': 3, 'house-air': 5 }));
    await illNode.coil(1, 'on');
    await wellNode.readings(pack({ 'bench-1': 5, 'house-air': 5 }));

    await poison(ill);
    await until('its alarm stands', async () => (await alarms(ill)).length === 1);
    const commands = () => illNode.frames.filter(({ frame }) => frame.type === 'command').length;
    const before = commands();
    illNode.sendRelays();
    await wellNode.readings(pack({ 'bench-1': 3 }));
    await wellNode.coil(1, 'on', 2000);
    expect((await switchings(well)).map(({ to, claim }) => [to, claim])).toEqual([['on', 'band']]);
    expect(await alarms(well)).toEqual([]);
    expect(commands()).toBe(before);

    await force(ill, { band: [{ from: '00:00', low: 4, high: 7.5 }] });
    await illNode.readings(pack({ 'bench-1': 3, 'house-air': 5 }));
    illNode.sendRelays();
    await until('it is commanded again', () => commands() > before);
    await until('its alarm is cleared', async () => (await alarms(ill))[0]?.cleared === true);
    illNode.close();
    wellNode.close();
  });
});

describe('A line on which nothing comes', () => {
  it('is pinged every 10 s and cut after 25 s, on which a pong keeps it', async () => {
    const [silent, answering] = [await makeScene(), await makeScene()];
    const dial = (scene: Scene, autoPong: boolean) => {
      const socket = new WebSocket(`${worker.url.replace('http', 'ws')}/field/v1`, {
        autoPong,
        headers: { authorization: `Bearer ${scene.token}` },
      });
      const seen = { pings: 0, closed: false };
      socket.on('ping', () => (seen.pings += 1));
      socket.on('close', () => (seen.closed = true));
      socket.on('error', () => undefined);
      return { socket, seen };
    };
    const [dead, alive] = [dial(silent, false), dial(answering, true)];
    await until('the silent one is cut', () => dead.seen.closed, 15_000);
    expect(dead.seen.pings).toBeGreaterThanOrEqual(2);
    await until('the other was pinged on', () => alive.seen.pings > dead.seen.pings + 2, 15_000);
    expect(alive.seen.closed).toBe(false);
    alive.socket.terminate();
  });
});
