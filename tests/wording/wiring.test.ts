import { describe, expect, it } from 'vitest';
import { plainText } from '@/lib/wording/phrase';
import { wiringSentence, type WiringStanding } from '@/lib/wording/wiring';

const now = Date.UTC(2026, 10, 27, 5, 45);
const node = { key: 'LH-1', lastHeardAt: now - 3000, isRevoked: false };
const channel = (number: number, label: string, isProved = true, isLockedOut = false) => ({
  number,
  label,
  isProved,
  isLockedOut,
});
const four = [
  channel(1, 'Gate-heap fan'),
  channel(2, 'Ground fan'),
  channel(3, 'Bench mat'),
  channel(4, 'Ridge vent', false),
];
const standing: WiringStanding = {
  nodes: [node],
  points: [{ name: 'House air', isGood: true }],
  channels: four,
};
const says = (change: Partial<WiringStanding> = {}) =>
  plainText(wiringSentence({ ...standing, ...change }, now)).replaceAll('\u00a0', ' ');

describe('the sentence of the wiring', () => {
  it('says how many channels are proved, which is not, and when the node answered', () => {
    expect(says()).toBe(
      'Three of four channels are proved. Channel 4, the ridge vent, has been wired but never tested. ' +
        'Field node LH-1 answered 3 s ago; its relays fall back to their safe states if it hears nothing for 30 s.',
    );
  });

  it('says what the node keeps by itself', () => {
    const keeps = (...labels: string[]) => says({ nodes: [{ ...node, keeps: labels }] });
    expect(keeps('Gate-heap fan')).toMatch(
      / if it hears nothing for 30 s, and it then runs the gate-heap fan by its fallback\.$/,
    );
    expect(keeps('Gate-heap fan', 'Ground fan', 'Bench mat')).toMatch(
      /runs the gate-heap fan, the ground fan and the bench mat by their fallbacks\.$/,
    );
  });

  it('says of a board what becomes of its relays, and never that they fall back by a lease', () => {
    const board = (watchdogS: number | null, change: object = {}) =>
      says({ nodes: [{ ...node, key: 'MB-1', board: { watchdogS }, ...change }] }).replace(
        /^.*tested\. /,
        '',
      );
    expect(board(null)).toBe(
      'Board MB-1 answered 3 s ago; having no watchdog, its relays stay as they are when the network fails.',
    );
    expect(board(20)).toBe(
      'Board MB-1 answered 3 s ago; its watchdog drops its relays 20 s after it was last spoken to.',
    );
    const silent = { lastHeardAt: now - 120_000 };
    expect(board(null, silent)).toMatch(/silent for 2 min; having no watchdog, its relays may still be as/);
    expect(board(20, silent)).toMatch(/silent for 2 min; its watchdog has dropped its relays\.$/);
    expect(board(null, { lastHeardAt: null })).toMatch(/^Board MB-1 has never answered: look at how it is/);
    expect(board(null, { isRevoked: true })).toMatch(/neither read nor switched\.$/);
  });

  it('says it shortly when all is proved', () => {
    expect(says({ channels: four.slice(0, 3) })).toMatch(/^All three channels are proved\. Field node/);
    expect(says({ channels: four.slice(0, 1) })).toMatch(/^The one channel is proved\. /);
  });

  it('names up to three unproved channels, and counts more', () => {
    const none = four.map((one) => ({ ...one, isProved: false }));
    expect(says({ channels: none.slice(0, 2) })).toMatch(
      /^None of two channels are proved\. Channel 1, the gate-heap fan, and channel 2, the ground fan, have been wired/,
    );
    expect(says({ channels: none })).toContain('Four channels have been wired but never tested.');
  });

  it('puts a lock-out first', () => {
    expect(says({ channels: [channel(1, 'Gate-heap fan', true, true)] })).toMatch(
      /^The gate-heap fan is locked out\. The one channel is proved\./,
    );
  });

  it('says what to do first where there is no node', () => {
    expect(says({ nodes: [], channels: [], points: [] })).toMatch(/^No field node yet\. .*register it first/);
  });

  it('says what is missing where there are no channels', () => {
    expect(says({ channels: [] })).toMatch(
      /^No channel yet, but one point: this house is measured, and nothing is switched\./,
    );
    expect(says({ channels: [], points: [] })).toMatch(/^No channel yet, and no point/);
  });

  it('says a silent node for how long, and what its relays do', () => {
    expect(says({ nodes: [{ ...node, lastHeardAt: now - 240_000 }] })).toContain(
      'Field node LH-1 has been silent for 4 min; its relays are in their safe states.',
    );
  });

  it('says what to do with a node that never answered, or was revoked', () => {
    expect(says({ nodes: [{ ...node, lastHeardAt: null }] })).toContain(
      'has never answered: put its token into it.',
    );
    expect(says({ nodes: [{ ...node, isRevoked: true }] })).toContain('Field node LH-1 is revoked');
  });
});
