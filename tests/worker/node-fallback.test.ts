/** What is made of a node's logs and reports, in whichever order and however late they come. */
import { describe, expect, it } from 'vitest';
import type { ChannelWiring } from '@/db/queries/plan';
import { readFallbackText } from '@/lib/field/fallback-log';
import { NodeFallback } from '@/worker/control/node-fallback';

const fan: ChannelWiring = {
  ...{ id: 'fan', number: 1, key: 'fan', label: 'Fan', nodeId: 'node', relay: 1, contact: 'NO' },
  fallback: { point: 'bench', below: 2, above: 5, onFor: 1200, offFor: 2400 },
  ...{ proved: true, lockedOut: false },
};
const S = 1000;
const on = { '1': 'on' as const };
const off = { '1': 'off' as const };

/** What happened, each with its second: a log's text, or a report of a coil with whether it seems alone and turned. */
function played(
  channel: ChannelWiring,
  steps: (string | [at: number, coil: 'on' | 'off', alone: boolean, turned: boolean])[],
) {
  const fallback = new NodeFallback(() => [channel]);
  const changes = steps.flatMap((one) => {
    if (typeof one !== 'string') {
      const [at, coil, alone, turned] = one;
      return fallback.takeReport(coil === 'on' ? on : off, alone, at * S, new Set(turned ? [1] : []));
    }
    const entry = readFallbackText(one);
    if (entry === null) throw new Error(`no text of a fallback: ${one}`);
    return fallback.takeLog(entry);
  });
  const runs = fallback.runsOf('fan').map(({ from, to }) => [from / S, to / S]);
  return { changes: changes.map(({ at, coil }) => [at / S, coil]), runs };
}

describe('What a node did by itself', () => {
  it('is what its logs say, with their times, though its first report came before them', () => {
    const told = played(fan, [
      [900, 'on', true, true],
      'fallback begun at=130',
      'fallback on at=140 relay=1 why=below',
      'fallback off at=440 relay=1 why=above',
      'fallback on at=880 relay=1 why=below',
      'fallback off at=901 relay=1 why=command',
      'fallback ended at=901',
      [901, 'off', false, true],
    ]);
    expect(told.changes).toEqual([
      [140, 'on'],
      [440, 'off'],
      [880, 'on'],
      [901, 'off'],
    ]);
    expect(told.runs).toEqual([
      [140, 440],
      [880, 901],
    ]);
  });

  it('is what its reports say where it logs nothing: from its first report on', () => {
    const told = played(fan, [
      [900, 'on', true, true],
      [901, 'off', false, true],
    ]);
    expect(told).toEqual({
      changes: [
        [900, 'on'],
        [901, 'off'],
      ],
      runs: [[900, 901]],
    });
  });

  it('is nothing where a commanded coil is reported late, as after a stall of our own', () => {
    const told = played(fan, [
      [900, 'on', true, false],
      [900, 'on', true, false],
      [900, 'off', true, true],
      'fallback begun at=130',
      'fallback on at=130 relay=1 why=below',
      [900, 'on', false, true],
      'fallback off at=901 relay=1 why=command',
      'fallback ended at=901',
      [901, 'off', false, true],
    ]);
    expect(told).toEqual({
      changes: [
        [130, 'on'],
        [901, 'off'],
      ],
      runs: [[130, 901]],
    });
  });

  it('ends with the command that goes on with it, whether a log says so or not', () => {
    const begun = 'fallback on at=140 relay=1 why=below';
    const taken = [[140, 900]];
    expect(played(fan, [begun, 'fallback ended at=900', [910, 'on', false, false]]).runs).toEqual(taken);
    expect(
      played(fan, [begun, [900, 'on', false, false], [910, 'on', false, false], [920, 'on', false, false]])
        .runs,
    ).toEqual(taken);
  });

  it('ran no longer than it may, whatever was not seen of its end', () => {
    const told = played(fan, ['fallback on at=140 relay=1 why=below', 'fallback begun at=20000']);
    expect(told.runs).toEqual([[140, 1340]]);
    expect(told.changes).toEqual([
      [140, 'on'],
      [1340, 'off'],
    ]);
  });

  it('of a normally closed contact is no run while its coil is on', () => {
    const told = played({ ...fan, contact: 'NC' }, [
      'fallback on at=140 relay=1 why=below',
      'fallback off at=440 relay=1 why=above',
    ]);
    expect(told.runs).toEqual([]);
    expect(told.changes).toHaveLength(2);
  });

  it('of a relay that no channel has is nobody’s', () => {
    expect(played(fan, ['fallback on at=140 relay=7 why=below']).changes).toEqual([]);
  });

  it('told twice is told once', () => {
    const text = 'fallback on at=140 relay=1 why=below';
    expect(played(fan, [text, text]).changes).toEqual([[140, 'on']]);
  });
});
