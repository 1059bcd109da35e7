// Why a load was as it was at any moment, from what was kept at the time.
import { v7 } from 'uuid';
import { beforeAll, expect, test } from 'vitest';
import { everyHolding, type Holding } from '@/db/client';
import { noteGap } from '@/db/queries/control-gap';
import { writeRunning, type DecisionRow, type SwitchingRow } from '@/db/queries/running';
import { downTo } from '@/lib/server/why-ladder';
import type { Explanation } from '@/lib/control/events';
import type { Claim, Data, State } from '@/lib/control/types';
import { type Asker, type Json, newHolding, personOf } from './asker';
import { AT, makeLongHouse } from './long-house';
import * as shown from './shown';

const MIN = 60_000;
/** A night that is over: nothing of it hangs on the time of the test. */
const DUSK = Date.now() - 20 * 3_600_000;
const at = (minutes: number) => DUSK + minutes * MIN;

let larkmoor: Holding;
let owner: Asker;
let houseId: string;
let fan: string;

beforeAll(async () => {
  larkmoor = await newHolding('larkmoor');
  owner = await personOf(larkmoor, 'owner', 'owner@larkmoor.example');
  houseId = await makeLongHouse(owner);
  fan = String((await owner.make(`${AT}/channels`, shown.fan))['id']);
  await writeRunning(everyHolding(), {
    switchings: [
      switched(0, 'on', 'band', {}, [{ kind: 'then', at: at(40), state: 'off', claim: 'rest' }]),
      switched(40, 'off', 'rest', { cause: 'credit-spent', restUntil: at(70) }),
      switched(110, 'on', 'band', {}),
      switched(200, 'off', 'idle', { rules: [] }),
    ],
    decisions: [
      ...[0, 40, 110].map((minutes, place) => decided(minutes, place % 2 === 0 ? 'on' : 'off', 'band', null)),
      decided(70, 'off', 'hand', told(70, 'off', 'hand', { by: 'grower@larkmoor.example', until: at(110) })),
    ],
    reports: [],
    memories: [],
  });
});

function told(minutes: number, state: State, claim: Claim, because: Data, next: Data[] = []): Explanation {
  const ladder = downTo(claim, state).map((step) => (step.speaks ? { ...step, because } : step));
  const until = typeof because['until'] === 'number' ? because['until'] : null;
  return { channel: fan, at: at(minutes), state, claim, until, ladder, next, rule: null };
}

const head = (minutes: number) => ({
  ...{ holdingId: larkmoor.id, houseId, id: v7(), channelId: fan, at: new Date(at(minutes)) },
});

function switched(minutes: number, to: State, claim: Claim, because: Data, next: Data[] = []): SwitchingRow {
  const from = to === 'on' ? 'off' : 'on';
  const explanation = told(minutes, to, claim, because, next);
  return { ...head(minutes), from, to, claim, number: 4_294_967_297 + minutes, version: 7, explanation };
}

function decided(minutes: number, state: State, claim: Claim, explanation: Explanation | null): DecisionRow {
  return { ...head(minutes), state, claim, explanation };
}

async function why(minutes: number): Promise<Json> {
  const moment = encodeURIComponent(new Date(at(minutes)).toISOString());
  const answer = await owner.get(`${AT}/channels/1/why?at=${moment}`);
  expect(answer.status).toBe(200);
  return answer.body;
}
const ms = (value: unknown) => Date.parse(String(value));
const speaker = (body: Json) => (body['ladder'] as Json[]).find((step) => step['speaks'] === true);

test('a moment in mid-draw has the ladder, what was foreseen when it began, and what really came', async () => {
  const body = await why(15);
  expect(body).toMatchObject({ state: 'on', claim: 'band', version: 7, gaps: [], under: [] });
  expect([ms(body['since']), ms(body['foreseenAt'])]).toEqual([at(0), at(0)]);
  expect(body['next']).toMatchObject([{ kind: 'then', state: 'off', claim: 'rest' }]);
  expect(ms((body['next'] as Json[])[0]?.['at'])).toBe(at(40));
  expect(body['ended']).toMatchObject({ state: 'off', claim: 'rest' });
  expect(ms((body['ended'] as Json)['at'])).toBe(at(40));
});

test('a hand on a load that stood still already tells by whom', async () => {
  const body = await why(90);
  expect(body).toMatchObject({ state: 'off', claim: 'hand' });
  expect(speaker(body)).toMatchObject({ claim: 'hand', because: { by: 'grower@larkmoor.example' } });
  expect([ms(body['since']), ms(body['until'])]).toEqual([at(70), at(110)]);
});

test('the switchings before and after are named, so that one can go from one to the next', async () => {
  const body = await why(50);
  expect([ms(body['earlier']), ms(body['later'])]).toEqual([at(0), at(110)]);
  expect(await why(10)).toMatchObject({ earlier: null });
});

test('before the first decision nothing is known, and the answer says since when it is', async () => {
  const moment = encodeURIComponent(new Date(at(-5)).toISOString());
  const answer = await owner.get(`${AT}/channels/1/why?at=${moment}`);
  expect(answer.status).toBe(404);
  expect(String(answer.body['detail'])).toMatch(/^Nothing was decided for this channel before \d{4}-/);
});

test('where control did not run, the load is told as fallen, and the hours are named', async () => {
  await noteGap(everyHolding(), { from: at(130), to: at(180) });
  const body = await why(150);
  expect(body).toMatchObject({ state: 'off', claim: 'fail-safe', next: [] });
  expect(speaker(body)).toMatchObject({ claim: 'fail-safe', because: { safe: 'off', points: [] } });
  const [gap] = body['gaps'] as Json[];
  expect([ms(gap?.['from']), ms(gap?.['to'])]).toEqual([at(130), at(180)]);
  // until the lease ran out the load ran on, and before that nobody was missing
  expect(await why(125)).toMatchObject({ state: 'on', claim: 'band' });
});

test('a lock-out that was removed since says when, and by whom', async () => {
  const lockout = await owner.make(`${AT}/lockouts`, { channel: 'gate-heap-fan', why: 'belt' });
  const id = String(lockout['id']);
  const because = { lockouts: [{ id, why: 'belt', by: 'owner@larkmoor.example', placedAt: at(210) }] };
  const explanation = told(210, 'off', 'lock-out', because);
  const decisions = [decided(210, 'off', 'lock-out', explanation)];
  await writeRunning(everyHolding(), { switchings: [], decisions, reports: [], memories: [] });
  expect(await owner.ask('DELETE', `${AT}/lockouts/${id}`)).toMatchObject({ status: 204 });
  const [placed] = (speaker(await why(220))?.['because'] as Json)['lockouts'] as Json[];
  expect(placed).toMatchObject({ why: 'belt', removedBy: 'owner@larkmoor.example' });
  expect(ms(placed?.['removedAt'])).toBeGreaterThan(at(220));
});
