import { expect, it } from 'vitest';
import { nodeStatus } from '@/components/wiring/node-status';

it('what a node’s row keeps is read with care', () => {
  const refusals = [{ at: 1, name: 'bench-9', why: 'this node has no point of that name' }];
  expect(nodeStatus({ firmware: 'f 1', boot: 7, clockErrorS: 0.2, trips: 0, refused: 2, refusals })).toEqual({
    ...{ firmware: 'f 1', boot: '7', clockErrorS: 0.2, trips: 0, refused: 2 },
    refusals: [{ name: 'bench-9', why: 'this node has no point of that name' }],
  });
});

it('what an older worker did not keep, or kept otherwise, is not known', () => {
  const none = { firmware: null, boot: null, clockErrorS: null, trips: null, refused: null, refusals: [] };
  expect(nodeStatus(undefined)).toEqual(none);
  expect(nodeStatus({ refused: 'two', refusals: [null, { name: 3 }], boot: '' })).toEqual(none);
});
