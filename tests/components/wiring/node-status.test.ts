import { expect, it } from 'vitest';
import { canFallback, nodeStatus } from '@/components/wiring/node-status';

it('what a node’s row keeps is read with care', () => {
  const refusals = [{ at: 1, name: 'bench-9', why: 'this node has no point of that name' }];
  expect(nodeStatus({ firmware: 'f 1', boot: 7, clockErrorS: 0.2, trips: 0, refused: 2, refusals })).toEqual({
    ...{ firmware: 'f 1', boot: '7', clockErrorS: 0.2, trips: 0, refused: 2, canFallback: 'not-told' },
    refusals: [{ name: 'bench-9', why: 'this node has no point of that name' }],
  });
});

it('what an older worker did not keep, or kept otherwise, is not known', () => {
  const known = { firmware: null, boot: null, clockErrorS: null, trips: null, refused: null, refusals: [] };
  const none = { ...known, canFallback: 'not-told' };
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
