// Proving a channel by the interface: in order, by whom, and against what was seen.
import { sql } from 'drizzle-orm';
import sharp from 'sharp';
import { beforeAll, describe, expect, it } from 'vitest';
import { everyHolding } from '@/db/client';
import { listPersonCommands } from '@/db/queries/person-command';
import { errorsOf, itemsOf, type Json } from './asker';
import { AT } from './long-house';
import { channelOf, Going, PROOFS, proofScene, type ProofScene } from './proof-scene';
import { picture } from './picture';

let scene: ProofScene;
const bare = { source: null, runProof: null, fallback: null, frostHelp: false, flow: null };
let made = 0;
/** Another channel with a relay of its own. */
async function channel(more: object = {}): Promise<{ key: string; id: string }> {
  made += 1;
  const key = `c${made}`;
  const id = await scene.channel({ number: made, relay: made, key, label: `Fan ${made}`, ...bare, ...more });
  return { key, id };
}
beforeAll(async () => {
  scene = await proofScene();
});

const DEAD = { testerBefore: true, circuitDead: true, testerAfter: true };

describe('the steps', () => {
  it('are refused out of turn, with the one that comes first', async () => {
    const going = await Going.begin(scene.installer, (await channel()).key);
    for (const [step, more] of [
      ['rating', {}],
      ['clear', { peopleClear: true, isolatorOn: true }],
      ['seen', { saw: 'right' }],
      ['unplugged', { fell: true }],
    ] as const) {
      const told = await going.take(step, more);
      expect([told.status, String(told.body['detail'])]).toEqual([
        409,
        'First: isolator off and locked, circuit dead at the board.',
      ]);
    }
    expect((await going.run('pulse', 10)).status).toBe(409);
    const finished = await scene.installer.ask('POST', `${going.path}/finish`);
    expect([finished.status, finished.body['detail']]).toEqual([
      409,
      'Not all is proved yet. Next: Isolator off and locked, circuit dead at the board.',
    ]);
  });

  it('want each look at the dead circuit, and say which is missing', async () => {
    const going = await Going.begin(scene.installer, (await channel()).key);
    const told = await going.take('dead', { ...DEAD, testerAfter: false });
    expect(told.status).toBe(422);
    expect(errorsOf(told)).toMatchObject([{ path: 'testerAfter', message: /Prove the tester again/ }]);
    expect((await going.take('dead', DEAD)).status).toBe(200);
  });

  it('refuse a load that is over its contact, with the arithmetic, and a heater without a high limit', async () => {
    const over = { load: { kind: 'motor', watts: 60, volts: 24, supply: 'dc', contactAmps: 5 } };
    const heater = { load: { kind: 'heater', watts: 60, volts: 24, supply: 'dc', contactAmps: 5 } };
    for (const [load, why] of [
      [over, /60.W ÷ 24.V = 2\.50.A is over 1\.67.A \(a third of the contact’s 5.A\)/],
      [heater, /high limit/],
    ] as const) {
      const going = await Going.begin(scene.installer, (await channel(load)).key);
      await going.mustTake('dead', DEAD);
      const told = await going.take('rating');
      expect([told.status, told.body['detail']]).toEqual([409, expect.stringMatching(why)]);
    }
  });

  it('that are not needed say why, and are not taken', async () => {
    const { key, id } = await channel();
    const going = await Going.begin(scene.installer, key);
    await going.untilClear();
    await going.run('pulse', 10);
    await scene.reports(id, 'on');
    await going.stop();
    await going.mustTake('seen', { saw: 'right' });
    expect(await going.states()).toMatchObject({ current: 'not-needed', gain: 'not-needed' });
    const told = await going.take('current');
    expect([told.status, told.body['detail']]).toEqual([409, expect.stringMatching(/not needed.*No sensor/)]);
    expect((await going.run('gain')).status).toBe(409);
  });

  it.each([
    [{}, 'step'],
    [{ step: 'run' }, 'step'],
    [{ step: 'dead', testerBefore: true, circuitDead: true, testerAfter: true, by: 'x' }, 'by'],
    [{ step: 'seen', saw: '<script>' }, 'saw'],
    [{ step: 'photographs', without: ' ' }, 'without'],
    [{ step: 'photographs', without: 'x'.repeat(501) }, 'without'],
    [{ step: 'last-resort', below: 1e9, cameOnAt: 1 }, 'below'],
  ])('are not taken from %o', async (body, path) => {
    const open = itemsOf(await scene.installer.get(PROOFS)).find((one) => one['endedAt'] === null);
    const told = await scene.installer.ask('POST', `${PROOFS}/${String(open?.['id'])}/steps`, body);
    expect(told.status).toBe(422);
    expect(errorsOf(told)).toEqual(
      expect.arrayContaining([expect.objectContaining({ path: expect.stringContaining(path) })]),
    );
  });
});

describe('a run', () => {
  it('orders what the core ends by itself, and no longer than it may last', async () => {
    const { key, id } = await channel();
    const going = await Going.begin(scene.installer, key);
    await going.untilClear();
    for (const [seconds, status] of [
      [61, 422],
      [2, 422],
      [1.5, 422],
      [10, 200],
    ] as const)
      expect((await going.run('pulse', seconds)).status).toBe(status);
    const orders = await listPersonCommands(scene.holding, scene.houseId, 0);
    expect(orders.at(-1)?.body).toEqual({ kind: 'prove', channel: id, seconds: 10 });
    const again = await going.run('pulse', 10);
    expect([again.status, again.body['detail']]).toEqual([409, 'A run goes on. Stop it, or let it end.']);
    expect((await going.stop()).status).toBe(200);
    expect((await listPersonCommands(scene.holding, scene.houseId, 0)).at(-1)?.body).toEqual({
      ...{ kind: 'prove-end', channel: id },
    });
    expect((await going.stop()).status).toBe(409);
  });

  it('is refused on a locked-out channel, with the reason and the name', async () => {
    const { key } = await channel();
    const going = await Going.begin(scene.installer, key);
    await going.untilClear();
    await scene.grower.make(`${AT}/lockouts`, { channel: key, why: 'the belt is off' });
    const told = await going.run('pulse', 10);
    expect([told.status, told.body['detail']]).toEqual([
      409,
      'Locked out by grower@larkmoor.example: “the belt is off”. Have the lock-out removed before it is run.',
    ]);
  });

  it('is refused where nothing would move, and where the load runs already', async () => {
    const { key } = await channel();
    const going = await Going.begin(scene.installer, key);
    await going.untilClear();
    await scene.stands({ online: false });
    expect((await going.run('pulse', 10)).body['detail']).toMatch(/LH-1 is not heard/);
    await scene.stands({ counted: 'on' });
    expect((await going.run('pulse', 10)).body['detail']).toMatch(/runs already/);
    await scene.stands();
    expect((await going.run('pulse', 10)).status).toBe(200);
  });

  it('says which claim decides instead, and does not count where the relay never reported on', async () => {
    const { key } = await channel();
    const going = await Going.begin(scene.installer, key);
    await going.untilClear();
    await going.run('pulse', 10);
    await scene.stands({ claim: 'interlock', taken: 1000 });
    const [run] = (await scene.installer.get(going.path)).body['runs'] as Json[];
    expect(run).toMatchObject({ kind: 'pulse', isOver: false, startedAt: null, heldBy: 'interlock' });
    await scene.stands();
    await going.stop();
    expect(await going.states()).toMatchObject({ run: 'open' });
    expect((await going.take('seen', { saw: 'right' })).body['detail']).toMatch(/^First: run from here/);
  });

  it('after which something moved the wrong way takes the proof back to a dead circuit', async () => {
    const { key, id } = await channel();
    const going = await Going.begin(scene.installer, key);
    await going.untilClear();
    await going.run('pulse', 10);
    await scene.reports(id, 'on');
    await going.stop();
    expect(await going.states()).toMatchObject({ run: 'done', seen: 'open' });
    await going.mustTake('seen', { saw: 'wrong-way', note: 'L and N2 swapped' });
    expect(await going.states()).toMatchObject({
      dead: 'open',
      run: 'open',
      seen: 'failed',
      photographs: 'done',
    });
    expect((await going.run('pulse', 10)).body['detail']).toMatch(/^First: isolator off/);
  });
});

describe('who', () => {
  it('a grower may read a proof and take no part in it', async () => {
    const { key } = await channel();
    const going = await Going.begin(scene.owner, key);
    expect((await scene.grower.get(going.path)).status).toBe(200);
    for (const [method, path, body] of [
      ['POST', PROOFS, { channel: key }],
      ['POST', `${going.path}/steps`, { step: 'dead', ...DEAD }],
      ['POST', `${going.path}/runs`, { kind: 'pulse' }],
      ['DELETE', `${going.path}/runs`, undefined],
      ['POST', `${going.path}/finish`, undefined],
      ['POST', `${going.path}/give-up`, { why: 'x' }],
    ] as const)
      expect((await scene.grower.ask(method, path, body)).status).toBe(403);
  });

  it('two installers at one panel share the proof that goes on', async () => {
    const { key } = await channel();
    const going = await Going.begin(scene.installer, key);
    const second = await scene.owner.ask('POST', PROOFS, { channel: key });
    expect([second.status, `${PROOFS}/${String(second.body['id'])}`]).toEqual([200, going.path]);
  });
});

describe('the photographs of a proof', () => {
  it('are kept without place or camera, and go only while the proof goes on', async () => {
    const going = await Going.begin(scene.installer, (await channel()).key);
    const plate = await going.photograph('plate');
    const address = `${AT}/proof-photographs/${String(plate['id'])}`;
    const { exif, format } = await sharp((await scene.grower.get(address)).bytes).metadata();
    expect([exif, format]).toEqual([undefined, 'jpeg']);
    expect((await scene.grower.ask('DELETE', address)).status).toBe(403);
    // the heap book's door does not lead to them
    expect((await scene.grower.ask('DELETE', `${AT}/photographs/${String(plate['id'])}`)).status).toBe(404);
    expect((await scene.installer.ask('POST', `${going.path}/give-up`, { why: 'rain' })).status).toBe(200);
    expect((await scene.installer.ask('DELETE', address)).status).toBe(409);
    const late = await scene.installer.ask('POST', `${going.path}/photographs?shows=plate`, await picture());
    expect(late.status).toBe(409);
  });

  it('must show the plate and the wiring, or a reason stands in their place', async () => {
    const going = await Going.begin(scene.installer, (await channel()).key);
    await going.mustTake('dead', DEAD);
    await going.mustTake('rating');
    await going.photograph('plate');
    expect((await going.take('photographs')).body['detail']).toMatch(/wiring is missing/);
    const bad = await scene.installer.ask('POST', `${going.path}/photographs?shows=panel`, await picture());
    expect(bad.status).toBe(422);
    await going.mustTake('photographs', { without: 'the panel is behind glass' });
    expect(await going.states()).toMatchObject({ photographs: 'without' });
  });
});

describe('a proof that is whole', () => {
  it('proves the channel, is kept as it was, and goes with another wiring', async () => {
    const { key, id } = await channel();
    const going = await Going.begin(scene.installer, key);
    await going.untilClear();
    await going.run('pulse', 10);
    await scene.reports(id, 'on');
    await going.stop();
    await going.mustTake('seen', { saw: 'right' });
    expect((await going.take('unplugged', { fell: true })).body['detail']).toMatch(
      /Begin the run for unplugging/,
    );
    await going.run('unplug');
    expect((await going.take('unplugged', { fell: true })).body['detail']).toMatch(/has not told yet/);
    const renewedAt = Date.now();
    await everyHolding().execute(sql`
      insert into switching (holding_id, id, house_id, channel_id, at, "from", "to", claim, trip, explanation)
      values (${scene.holding.id}, gen_random_uuid(), ${scene.houseId}, ${id}, now(), 'on', 'off', 'fail-safe', 'b/1',
        ${JSON.stringify({ ladder: [{ because: { lease: { renewedAt, toldAt: renewedAt + 47_000 } } }] })}::jsonb)`);
    await going.mustTake('unplugged', { fell: true });
    const finished = await scene.installer.ask('POST', `${going.path}/finish`);
    expect(finished.body).toMatchObject({ outcome: 'proved', endedBy: 'installer@larkmoor.example' });
    const steps = finished.body['steps'] as Json[];
    expect(steps.find((one) => one['step'] === 'unplugged')).toMatchObject({
      state: 'done',
      record: { figures: { how: 'lease', awayS: 47 } },
    });
    expect(steps.find((one) => one['step'] === 'gain')).toMatchObject({
      state: 'not-needed',
      because: expect.stringMatching(/No loop/),
    });
    expect((await channelOf(scene.owner, key))['provedAt']).not.toBeNull();
    expect((await going.take('dead', DEAD)).status).toBe(409);

    await scene.owner.ask('PATCH', `${AT}/channels/${key}`, { label: 'Another name' });
    expect((await channelOf(scene.owner, key))['provedAt']).not.toBeNull();
    await scene.owner.ask('PATCH', `${AT}/channels/${key}`, { highLimit: { point: 'bench-1', above: 40 } });
    expect((await channelOf(scene.owner, key))['provedAt']).toBeNull();
  });

  it('ends half-way where the wiring is changed under it', async () => {
    const { key } = await channel();
    const going = await Going.begin(scene.installer, key);
    await going.mustTake('dead', DEAD);
    await scene.owner.ask('PATCH', `${AT}/channels/${key}`, { runProof: { point: 'fan-amps', above: 0.3 } });
    expect((await scene.installer.get(going.path)).body).toMatchObject({
      outcome: 'rewired',
      endedWhy: 'runProof',
      records: [{ step: 'dead', result: 'done' }],
    });
    await Going.begin(scene.installer, key);
  });
});

it('the thermostat of last resort that was seen to come on is the house’s from then on', async () => {
  const { key, id } = await channel({ frostHelp: true });
  const going = await Going.begin(scene.installer, key);
  await going.untilClear();
  await going.run('pulse', 10);
  await scene.reports(id, 'on');
  await going.stop();
  await going.mustTake('seen', { saw: 'right' });
  expect(await going.states()).toMatchObject({ 'last-resort': 'open' });
  await everyHolding().execute(sql`
    insert into switching (holding_id, id, house_id, channel_id, at, "from", "to", claim, trip, explanation)
    values (${scene.holding.id}, gen_random_uuid(), ${scene.houseId}, ${id}, now() + interval '1 second', 'on', 'off',
      'fail-safe', 'b/2', '{"ladder":[]}'::jsonb)`);
  await going.run('unplug');
  await going.mustTake('unplugged', { fell: true });
  const missing = await going.take('last-resort', { below: 1 });
  expect([missing.status, (errorsOf(missing) as Json[])[0]?.['path']]).toEqual([422, 'cameOnAt']);
  await going.mustTake('last-resort', { below: 1, cameOnAt: 1.3 });
  const house = await scene.owner.get(AT);
  expect(house.body['lastResort']).toMatchObject({
    below: 1,
    provedOn: expect.stringMatching(/^\d{4}-\d\d-\d\d$/),
  });
  expect((await scene.installer.ask('POST', `${going.path}/finish`)).body['outcome']).toBe('proved');
});
