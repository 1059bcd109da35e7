import { expect, it } from 'vitest';
import { canFallback, nodeStatus } from '@/components/wiring/node-status';

it('what a node’s row keeps is read with care', () => {
  const refusals = [{ at: 1, name: 'bench-9', why: 'this node has no point of that name' }];
  expect(nodeStatus({ firmware: 'f 1', boot: 7, clockErrorS: 0.2, trips: 0, refused: 2, refusals })).toEqual({
    ...{ firmware: 'f 1', boot: '7', clockErrorS: 0.2, trips: 0, refused: 2, canFallback: 'not-told' },
    refusals: [{ name: 'bench-9', why: 'this node has no point of that name' }],
    ...{ restarts: null, readingsAMinute: null, relaysTold: null, unknown: [] },
  });
});

it('its restarts, its pace, its relays and the names that it sends without a point are read too', () => {
  const unknown = [{ name: 'bench-9', unit: 'Cel', at: 1 }, { name: 'x', unit: null, at: 1 }, 7];
  const kept = { restarts: 3, readingsAMinute: 28, channels: 4, unknown };
  expect(nodeStatus(kept)).toMatchObject({
    ...{ restarts: 3, readingsAMinute: 28, relaysTold: 4 },
    unknown: [
      { name: 'bench-9', unit: 'Cel' },
      { name: 'x', unit: null },
    ],
  });
});

it('what an older worker did not keep, or kept otherwise, is not known', () => {
  const known = { firmware: null, boot: null, clockErrorS: null, trips: null, refused: null, refusals: [] };
  const alsoUnknown = { restarts: null, readingsAMinute: null, relaysTold: null, unknown: [] };
  const none = { ...known, ...alsoUnknown, canFallback: 'not-told' };
  expect(nodeStatus(undefined)).toEqual(none);
  expect(nodeStatus({ refused: 'two', refusals: [null, { name: 3 }], boot: '' })).toEqual(none);
});

it('a node can run fallbacks where its hello said so, and never on a bus', () => {
  const nodes = ['socket', 'socket', 'socket', 'modbus'].map((kind, place) => ({
    id: String(place),
    key: `N-${place}`,
    kind,
  }));
  const kept = { '0': { can: ['fallback'] }, '1': { can: [] }, '2': {}, '3': { can: ['fallback'] } };
  expect(canFallback(nodes, kept)).toEqual({
    'N-0': 'can',
    'N-1': 'cannot',
    'N-2': 'not-told',
    'N-3': 'cannot',
  });
});
