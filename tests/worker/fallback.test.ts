/** A node that ran its fallback while nobody commanded it, at twenty times: what is sent to it, stored of it and reckoned. */
import { sql } from 'drizzle-orm';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { closePools } from '@/db/client';
import { makeScene, rows, switchings, type Scene } from '../support/field-scene';
import { OutsideNode, type Brings, type Command } from '../support/outside-node';
import { ownWorker, type OwnWorker } from '../support/own-worker';
import { until } from '../support/until';

const fallback = { point: 'bench-1', below: 2, above: 5, onFor: 1200, offFor: 2400 };
const rest = { longestDraw: 1200, least: 1800, frostMayBreak: true };
let worker: OwnWorker;
beforeAll(async () => {
  worker = await ownWorker(true, undefined, 20);
});
afterAll(async () => {
  await worker.stop();
  await closePools();
});

const scene = () => makeScene({ rest }, { fallback });
const join = (scene: Scene, brings: Brings = { can: ['fallback'] }) =>
  OutsideNode.connect(worker.url, scene.token, 'N-1', 4, brings);
const command = async (node: OutsideNode) =>
  (await node.next((frame) => frame.type === 'command')) as unknown as Command;

/** A node whose line was lost, and whose last command has run out since. */
async function away(scene: Scene): Promise<{ boot: string; number: number; from: number }> {
  const node = await join(scene);
  const t = node.now();
  await node.readings(['bench-1', 'house-air', 'core'].map((n) => ({ n, u: 'Cel', t, v: 5.5 })));
  node.terminate();
  const { boot, number } = node;
  await until('the lease is over', () => node.now() > t + 35, 10_000);
  return { boot, number, from: t + 31 };
}
/** A quiet house: a fan that nobody wants on is off once the node is commanded again. */
const credit = async (scene: Scene) => {
  const [row] = await rows<{ credit: number }>(
    scene,
    sql`select (state -> 'sources' -> 0 ->> 'credit')::float8 as credit from control_memory where house_id = ${scene.houseId}`,
  );
  return row?.credit ?? NaN;
};
const alarms = (scene: Scene) =>
  rows<{ kind: string }>(scene, sql`select kind from alarm where house_id = ${scene.houseId}`);

describe('A fallback', () => {
  it('goes to a node that can run it, for the relays that have one', async () => {
    const node = await join(await scene());
    expect((await command(node)).fallback).toEqual({ '1': fallback });
    node.close();
  });

  it('is not sent to a node that did not say that it can', async () => {
    const node = await join(await scene(), {});
    expect(await command(node)).not.toHaveProperty('fallback');
    node.close();
  });

  it('that ran is stored with the node’s own times, drawn from the credit, and no alarm', async () => {
    const house = await scene();
    const { boot, number, from } = await away(house);
    const logs = [
      `fallback begun at=${from}`,
      `fallback on at=${from} relay=1 why=below point=bench-1 value=1.9`,
    ];
    const node = await join(house, { boot, number, can: ['fallback'], coils: { '1': 'on' }, logs });
    await node.coil(1, 'off');
    const t = node.now();
    for (const text of [`fallback off at=${t} relay=1 why=command point=bench-1`, `fallback ended at=${t}`]) {
      const seq = node.log(text);
      await node.next((frame) => frame.type === 'ack' && frame['seq'] === seq);
    }
    const stored = await switchings(house);
    expect(stored.map(({ to, claim, number: n }) => [to, claim, n])).toEqual([
      ['on', 'fail-safe', null],
      ['off', 'fail-safe', null],
    ]);
    const [on] = await rows<{ at: number; fallback: object }>(
      house,
      sql`select extract(epoch from at)::float8 as at, explanation -> 'ladder' -> 0 -> 'because' -> 'fallback' as fallback
        from switching where channel_id = ${house.fan} order by at`,
    );
    expect(on?.at).toBeCloseTo(from, 2);
    expect(on?.fallback).toEqual({
      state: 'on',
      point: 'bench-1',
      value: 1.9,
      why: 'below',
      below: 2,
      above: 5,
    });
    await until('its draw is reckoned', async () => (await credit(house)) < 1);
    expect(1 - (await credit(house))).toBeLessThan((t - from) / 1200 + 0.01);
    expect((await alarms(house)).map(({ kind }) => kind)).not.toContain('relay-does-not-follow');
    node.close();
  });

  it('told again is stored once', async () => {
    const house = await scene();
    const { boot, number, from } = await away(house);
    const logs = [
      `fallback begun at=${from}`,
      `fallback on at=${from} relay=1 why=below`,
      `fallback off at=${from + 2} relay=1 why=above`,
      `fallback ended at=${from + 3}`,
    ];
    for (let time = 0; time < 2; time += 1) {
      const node = await join(house, { boot, number, can: ['fallback'], logs });
      await until(
        'all are answered',
        () => node.frames.filter(({ frame }) => frame.type === 'ack').length === 4,
      );
      node.terminate();
    }
    expect(await switchings(house)).toHaveLength(2);
    const kept = await rows<{ count: number }>(
      house,
      sql`select count(*)::int as count from node_log where house_id = ${house.houseId}`,
    );
    expect(kept).toEqual([{ count: 4 }]);
  });

  it('that no log tells of is told by the relays', async () => {
    const house = await scene();
    const { boot, number } = await away(house);
    const node = await join(house, { boot, number, can: ['fallback'], coils: { '1': 'on' } });
    await node.coil(1, 'off');
    await until('it is stored', async () => (await switchings(house)).length === 2);
    expect((await switchings(house)).map(({ to, claim, number: n }) => [to, claim, n])).toEqual([
      ['on', 'fail-safe', null],
      ['off', 'fail-safe', null],
    ]);
    node.close();
  });

  it('that put a coil on again after a trip leaves the trip a switching of its own', async () => {
    const house = await scene();
    const first = await join(house);
    const t = first.now();
    await first.readings(['bench-1', 'house-air', 'core'].map((n) => ({ n, u: 'Cel', t, v: 3 })));
    await first.coil(1, 'on');
    first.terminate();
    const { boot, number } = first;
    await until('the lease is over', () => first.now() > t + 40, 10_000);
    const logs = [`fallback begun at=${t + 31}`, `fallback on at=${t + 31} relay=1 why=below`];
    const node = await join(house, { boot, number, can: ['fallback'], coils: { '1': 'on' }, trips: 1, logs });
    await until(
      'both are stored',
      async () => (await switchings(house)).filter((one) => one.number === null).length >= 2,
    );
    const [trip, alone] = (await switchings(house)).filter((one) => one.number === null);
    expect([trip?.claim, trip?.to, trip?.trip]).toEqual(['fail-safe', 'off', `${boot}/1`]);
    expect([alone?.claim, alone?.to]).toEqual(['fail-safe', 'on']);
    node.close();
  });

  it('of a channel that is locked out is not sent', async () => {
    const house = await scene();
    await rows(
      house,
      sql`insert into lockout (holding_id, id, house_id, channel_id, why, "by", at)
        values (${house.holding.id}, gen_random_uuid(), ${house.houseId}, ${house.fan}, 'work', 'test', now())`,
    );
    const node = await join(house);
    expect(await command(node)).not.toHaveProperty('fallback');
    node.close();
  });
});

describe('A log', () => {
  it('of any other text is kept as it came, and a node that raves is answered but not kept', async () => {
    const house = await scene();
    const node = await join(house);
    for (let count = 0; count < 130; count += 1) node.log(`battery \u0000 ${count}`, 'warning');
    await until(
      'all are answered',
      () => node.frames.filter(({ frame }) => frame.type === 'ack').length === 130,
    );
    const kept = await rows<{ text: string; level: string; fallback: unknown }>(
      house,
      sql`select text, level, fallback from node_log where house_id = ${house.houseId} order by id`,
    );
    expect(kept).toHaveLength(120);
    expect(kept[0]).toEqual({ text: 'battery \ufffd 0', level: 'warning', fallback: null });
    node.close();
  });

  it('that tells of a fallback in the future or long ago is a text like any other', async () => {
    const house = await scene();
    const node = await join(house);
    for (const at of [node.now() + 3600, node.now() - 30 * 86_400]) {
      const seq = node.log(`fallback on at=${at} relay=1 why=below`);
      await node.next((frame) => frame.type === 'ack' && frame['seq'] === seq);
    }
    expect(await switchings(house)).toEqual([]);
    node.close();
  });
});
