/** Which reports of a node's relays tell something, and so have to be looked at before anything else comes. */
import { describe, expect, it } from 'vitest';
import type { ChannelWiring } from '@/db/queries/plan';
import { commandNumber, leaseS, type Coils, type RelaysFrame } from '@/lib/field/frames';
import { NodeRelays } from '@/worker/control/node-relays';

const fan: ChannelWiring = {
  ...{ id: 'fan', number: 1, key: 'fan', label: 'Fan', nodeId: 'node', relay: 1, contact: 'NO' },
  fallback: { point: 'bench', below: 2, above: 5, onFor: 1200, offFor: 2400 },
  ...{ proved: true, lockedOut: false },
};
const said: RelaysFrame = { type: 'relays', seq: 1, channels: { '1': 'on' }, number: 7, trips: 0 };
const AT = 1_800_000_000_000;

/** A node that said this once. */
function spoken(): NodeRelays {
  const relays = new NodeRelays([fan], AT + leaseS * 1000, null, {});
  relays.take('boot', said, AT, true);
  return relays;
}

describe('A report of relays is news', () => {
  it('where it is the first, also where the coils are as they were known', () => {
    const relays = new NodeRelays([fan], null, null, { '1': 'on' });
    expect(relays.take('boot', said, AT).isNews).toBe(true);
  });

  it.each([
    ['another coil', 'boot', { channels: { '1': 'off' as const } }],
    ['a relay more', 'boot', { channels: { '1': 'on' as const, '2': 'off' as const } }],
    ['another command seen', 'boot', { number: 8 }],
    ['a trip', 'boot', { trips: 1 }],
    ['another boot', 'later', {}],
  ])('where it tells of %s', (_what, boot, more) => {
    expect(spoken().take(boot, { ...said, ...more }, AT + 10_000, true).isNews).toBe(true);
  });

  it('where the lease is over by now, so that the node may be running by itself', () => {
    expect(spoken().take('boot', said, AT + leaseS * 1000, true).isNews).toBe(true);
  });

  it('and is none where it says the same again, but its time is kept', () => {
    const relays = spoken();
    expect(relays.take('boot', { ...said, seq: 2 }, AT + 10_000, true).isNews).toBe(false);
    expect(relays.observed(fan)?.reportedAt).toBe(AT + 10_000);
  });
});

describe('A worker that has just started', () => {
  /** It goes on with relays that were reported so, and orders this. */
  function ordering(coil: 'on' | 'off', known: Coils = { '1': 'on' }): NodeRelays {
    const kept = { boot: 'boot', trips: 0 };
    const counted = { '1': 'on' } as const;
    const relays = new NodeRelays([fan], AT + leaseS * 1000, kept, known, { counted, known });
    relays.order(2, 1, new Map([[1, coil]]));
    return relays;
  }

  it('takes what a relay says for an answer where it orders nothing new of it', () => {
    const relays = ordering('on');
    relays.take('boot', said, AT + 1000);
    expect(relays.observed(fan)).toMatchObject({ reported: 'on', acknowledges: true });
  });

  it('takes a drop for one, and tells of its trip', () => {
    const relays = ordering('on');
    const { trip } = relays.take('boot', { ...said, channels: { '1': 'off' }, trips: 1 }, AT + 1000);
    expect(trip?.dropped).toEqual([fan]);
    expect(relays.observed(fan)).toMatchObject({ reported: 'off', acknowledges: true });
  });

  it('but not of one that it orders otherwise', () => {
    const relays = ordering('off');
    relays.take('boot', said, AT + 1000);
    expect(relays.observed(fan)).toMatchObject({ reported: 'on', acknowledges: false });
    relays.take('boot', { ...said, channels: { '1': 'off' }, number: commandNumber(2, 1) }, AT + 2000);
    expect(relays.observed(fan)).toMatchObject({ reported: 'off', acknowledges: true });
  });

  it('tells of a drop of one that was ordered on and never heard of', () => {
    const relays = ordering('on', { '1': 'off' });
    const { trip } = relays.take('boot', { ...said, channels: { '1': 'off' }, trips: 1 }, AT + 1000);
    expect(trip?.dropped).toEqual([fan]);
    // but not again of the next
    const next = relays.take('boot', { ...said, channels: { '1': 'off' }, trips: 2 }, AT + 2000);
    expect(next.trip?.dropped).toEqual([]);
  });

  it('nor does it so for one of which it cannot be said whether the order before reached it', () => {
    const relays = ordering('on', {});
    relays.take('boot', { ...said, channels: { '1': 'off' } }, AT + 1000);
    expect(relays.observed(fan)).toMatchObject({ reported: 'off', acknowledges: false });
  });

  it('waits for the new number where a load is switched on anew', () => {
    const relays = ordering('on');
    const number = relays.renumber(2);
    relays.take('boot', { ...said, number: number - 1 }, AT + 1000);
    expect(relays.observed(fan)?.acknowledges).toBe(false);
    relays.take('boot', { ...said, number }, AT + 2000);
    expect(relays.observed(fan)?.acknowledges).toBe(true);
  });
});
