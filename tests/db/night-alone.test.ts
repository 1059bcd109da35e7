/** A night's draws, of which one the node made by itself while it was lost, and one that never was. */
import { afterAll, beforeAll, expect, it } from 'vitest';
import { randomUUID } from 'node:crypto';
import { closePools, everyHolding } from '@/db/client';
import { clearAlarm, raiseAlarm } from '@/db/queries/alarm';
import { nightInputs, yardOfNights } from '@/db/queries/night-records';
import { listAlone, lastAlone } from '@/db/queries/node-log';
import { readAlone } from '@/db/queries/watch-alone';
import { loadHouse } from '@/db/queries/plan';
import { writeRunning, type SwitchingRow } from '@/db/queries/running';
import { nightNamed } from '@/lib/analysis/night';
import { summarise } from '@/lib/analysis/summarise';
import { makeScene, type Scene } from '../support/field-scene';

const MIN = 60_000;
const night = nightNamed('2026-11-20', 'Europe/London');
const at = (minutes: number) => night.from + minutes * MIN;
let scene: Scene;

/** What the worker keeps of a fallback: on and off at these minutes. */
function alone(minutes: number, to: 'on' | 'off'): SwitchingRow {
  const explanation = { channel: scene.fan, at: at(minutes), state: to, claim: 'fail-safe' as const };
  return {
    ...{ holdingId: scene.holding.id, houseId: scene.houseId, id: randomUUID(), channelId: scene.fan },
    ...{ at: new Date(at(minutes)), from: to === 'on' ? 'off' : 'on', to, claim: 'fail-safe', number: null },
    trip: `fallback/${at(minutes)}/${to}`,
    explanation: { ...explanation, until: null, ladder: [], next: [], rule: null },
  };
}

beforeAll(async () => {
  scene = await makeScene();
  const { holding, houseId, fan } = scene;
  const [node] = (await loadHouse(holding, houseId))?.nodes ?? [];
  const of = { holdingId: holding.id, channelId: fan };
  const log = (minutes: number, what: 'begun' | 'ended') => ({
    ...{ holdingId: holding.id, id: randomUUID(), houseId, nodeId: node?.id ?? '', level: 'info' },
    ...{
      at: new Date(at(minutes)),
      heardAt: new Date(at(300)),
      text: `fallback ${what}`,
      fallback: { what },
    },
  });
  await writeRunning(everyHolding(), {
    decisions: [{ ...of, houseId, id: randomUUID(), at: new Date(at(0)), state: 'off', claim: 'idle' }],
    reports: (
      [
        [0, 'off'],
        [400, 'on'],
        [430, 'off'],
      ] as const
    ).map(([minutes, state]) => ({ ...of, id: randomUUID(), at: new Date(at(minutes)), state, number: 1 })),
    switchings: [alone(120, 'on'), alone(140, 'off')],
    logs: [log(110, 'begun'), log(300, 'ended')],
    memories: [],
  });
  const base = { houseId, about: {}, data: {} };
  const lost = { ...base, key: `node-lost:${houseId}`, kind: 'node-lost', about: { node: 'N-1' } } as const;
  await raiseAlarm(holding, { ...lost, at: at(112) });
  await clearAlarm(holding, lost.key, at(300));
  const stood = {
    ...base,
    key: `fan:${houseId}`,
    kind: 'fan-standing',
    about: { channel: 'fan-1' },
  } as const;
  await raiseAlarm(holding, { ...stood, at: at(410) });
  await clearAlarm(holding, stood.key, at(430));
});
afterAll(closePools);

it('A night counts the run of a lost node, and of a fan only what its proof let stand', async () => {
  const yard = await yardOfNights(scene.holding, scene.houseId);
  if (yard === null) throw new Error('no house');
  const { sources } = await nightInputs(scene.holding, yard, night, night.to);
  const [input] = [...sources.values()];
  if (input === undefined) throw new Error('no source');
  const { onSeconds, starts, strips } = summarise(input);
  expect([onSeconds, starts]).toEqual([30 * 60, 2]);
  expect(strips[0]?.spans.filter(([, , , on]) => on).map(([, from, to]) => [from / 60, to / 60])).toEqual([
    [120, 140],
    [400, 410],
  ]);
});

it('Watch is told from when to when the node kept the house, and for how long what ran', async () => {
  const record = await loadHouse(scene.holding, scene.houseId);
  if (record === null) throw new Error('no house');
  expect(await readAlone(scene.holding, record, night.from, night.to)).toEqual([
    { node: 'N-1', from: at(110), to: at(300), ran: [{ label: 'Fan 1', seconds: 1200 }] },
  ]);
  expect(await readAlone(scene.holding, record, at(310), night.to)).toEqual([]);
  expect(await lastAlone(scene.holding, [scene.fan])).toEqual(new Map([[scene.fan, at(120)]]));
});

it('Another holding is told nothing of it', async () => {
  const stranger = { ...scene.holding, id: randomUUID() };
  expect(await listAlone(stranger, scene.houseId, night.from, night.to)).toEqual([]);
  expect(await lastAlone(stranger, [scene.fan])).toEqual(new Map());
});
