import { describe, expect, it } from 'vitest';
import { coilOf, relayWords } from '@/lib/wording/relay';

// a normally open contact is closed by its coil, a normally closed one is opened by it (IEC 60617: make and break contact)
describe('coil, contact and load are told apart', () => {
  it.each([
    ['NO', 'off', ['coil off', 'contact open', 'load off']],
    ['NO', 'on', ['coil on', 'contact closed', 'load on']],
    ['NC', 'on', ['coil off', 'contact closed', 'load on']],
    ['NC', 'off', ['coil on', 'contact open', 'load off']],
  ] as const)('%s with its load %s', (contact, load, told) => {
    const words = relayWords({ contact, wanted: load, reported: load, alarms: [] });
    expect([words.coil, words.contact, words.load]).toEqual(told);
    expect([words.fault, words.wanted]).toEqual([null, null]);
  });

  it('nothing is claimed of a relay that has told nothing', () => {
    expect(relayWords({ contact: 'NC', wanted: 'off', reported: null, alarms: [] })).toMatchObject({
      ...{ coil: 'coil not told', contact: 'contact not known', load: 'load not known' },
      ...{ isClosed: null, wanted: null },
    });
  });

  it('an order that is not yet reported stands beside what is', () => {
    expect(relayWords({ contact: 'NO', wanted: 'on', reported: 'off', alarms: [] })).toMatchObject({
      ...{ coil: 'coil off', load: 'load off', wanted: 'ordered: load on' },
    });
  });
});

describe('what a run proof has seen stands over what follows from the coil', () => {
  it('a load with current behind a dropped coil: the contact is closed', () => {
    const words = relayWords({ contact: 'NO', wanted: 'off', reported: 'off', alarms: ['runs-though-off'] });
    expect(words).toMatchObject({ coil: 'coil off', contact: 'contact closed', load: 'load has current' });
    expect(words.fault).toMatch(/welded/);
  });

  it('a load without current behind a drawn coil: the contact, the fuse or the load', () => {
    const words = relayWords({ contact: 'NO', wanted: 'on', reported: 'on', alarms: ['fan-standing'] });
    expect(words).toMatchObject({
      coil: 'coil on',
      contact: 'contact in doubt',
      load: 'load has no current',
    });
  });

  it('a coil that does not follow is a fault, and other alarms of the channel are not', () => {
    const told = (alarms: string[]) =>
      relayWords({ contact: 'NO', wanted: 'on', reported: 'off', alarms }).fault;
    expect(told(['relay-does-not-follow'])).toMatch(/does not follow/);
    expect(told(['no-gain', 'high-limit'])).toBeNull();
  });
});

it('a coil is the other way round from the load of an NC contact', () => {
  expect([coilOf('NO', 'on'), coilOf('NC', 'on'), coilOf('NC', 'off')]).toEqual(['on', 'off', 'on']);
});
