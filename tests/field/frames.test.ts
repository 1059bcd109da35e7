import { describe, expect, test } from 'vitest';
import { commandNumber, epochOf, nodeFrame, parseNodeFrame, parseServerFrame } from '@/lib/field/frames';

const hello = { type: 'hello', node: 'LH-1', firmware: 'y1', channels: 8, boot: 'b7', clock: null };
const relays = { type: 'relays', seq: 4, channels: { '1': 'on', '2': 'off' }, number: 0, trips: 0 };
const command = { type: 'command', number: 12, lease: 30, boot: 'b7', seen: 4, channels: { '1': 'on' } };
const fallback = { '1': { point: 'bench-1', below: 2, above: 5, onFor: 1200, offFor: 2400 } };

describe('frames of a node', () => {
  test.each([
    hello,
    { ...hello, clock: 1_800_000_000.5, can: ['fallback'], boot: 7 },
    relays,
    { type: 'readings', seq: 0, pack: [{ anything: 'goes' }, 7] },
    { type: 'log', seq: 9, level: 'warning', text: 'lease ended' },
  ])('$type is read', (frame) => {
    expect(parseNodeFrame(JSON.stringify(frame))).toEqual({ ok: true, frame });
  });

  test.each([
    ['text that is not JSON', '{"type":', 'not JSON'],
    ['an unknown type', '{"type":"weather"}', 'type'],
    ['a key that is not of the protocol', JSON.stringify({ ...relays, mood: 1 }), 'mood'],
    ['a relay that is no number', JSON.stringify({ ...relays, channels: { fan: 'on' } }), 'channels.fan'],
    [
      'a coil that is neither on nor off',
      JSON.stringify({ ...relays, channels: { '1': true } }),
      'channels.1',
    ],
    ['a number that is no whole number', JSON.stringify({ ...relays, number: 1.5 }), 'number'],
    ['a pack that is no list', '{"type":"readings","seq":1,"pack":{}}', 'pack'],
  ])('%s is malformed, and the reason names the place', (_what, text, why) => {
    const parsed = parseNodeFrame(text);
    expect(parsed.ok).toBe(false);
    expect(parsed.ok ? '' : parsed.why).toContain(why);
  });

  // most frames are readings, which are read without their schema where nothing is wrong with them
  test.each([
    '{"type":"readings","seq":3,"pack":[]}',
    '{"pack":[{"n":"a","v":1}],"seq":0,"type":"readings"}',
    '{"type":"readings","seq":9007199254740991,"pack":[1]}',
    '{"type":"readings","seq":9007199254740993,"pack":[]}',
    '{"type":"readings","seq":-1,"pack":[]}',
    '{"type":"readings","seq":1.5,"pack":[]}',
    '{"type":"readings","seq":1e999,"pack":[]}',
    '{"type":"readings","seq":"1","pack":[]}',
    '{"type":"readings","seq":1,"pack":null}',
    '{"type":"readings","seq":1,"pack":{"length":0}}',
    '{"type":"readings","seq":1}',
    '{"type":"readings","pack":[]}',
    '{"type":"readings","seq":1,"pack":[],"mood":1}',
    '{"type":"readings","seq":1,"pack":[],"__proto__":{}}',
    '{"type":"reading","seq":1,"pack":[]}',
    '["readings",1,[]]',
    'null',
  ])('%s is read as its schema says', (text) => {
    const { success, data } = nodeFrame.safeParse(JSON.parse(text));
    const parsed = parseNodeFrame(text);
    expect(parsed.ok).toBe(success);
    if (parsed.ok) expect(parsed.frame).toEqual(data);
  });

  test('a malformed frame still tells its seq, so that the error can name it', () => {
    expect(parseNodeFrame('{"type":"log","seq":31}')).toMatchObject({ ok: false, seq: 31 });
  });
});

describe('frames of the server', () => {
  test.each([
    { type: 'welcome', now: 1_800_000_000, rate: 60, lease: 30, report: 30 },
    { type: 'ack', seq: 3, stored: 2, duplicate: 1, refused: [{ index: 0, name: 'x', why: 'y' }] },
    { type: 'ack', seq: 3 },
    command,
    { ...command, fallback },
    { type: 'error', why: 'not JSON' },
  ])('$type is read', (frame) => {
    expect(parseServerFrame(JSON.stringify(frame))).toEqual({ ok: true, frame });
  });

  test('a command without the frame that it answers is malformed', () => {
    expect(parseServerFrame(JSON.stringify({ ...command, seen: undefined })).ok).toBe(false);
  });
});

describe('the number of a command', () => {
  test('holds epoch and counter beyond 32 bits', () => {
    expect(commandNumber(3, 17)).toBe(12884901905);
    expect(epochOf(commandNumber(1_000_000, 4_294_967_295))).toBe(1_000_000);
  });

  test('of a later epoch is above every number of an earlier one', () => {
    expect(commandNumber(5, 0)).toBeGreaterThan(commandNumber(4, 4_294_967_295));
  });

  test.each([
    [2 ** 21, 0],
    [1, 2 ** 32],
    [-1, 0],
    [1.5, 0],
  ])('is not given out for epoch %d, counter %d', (epoch, counter) => {
    expect(() => commandNumber(epoch, counter)).toThrow(RangeError);
  });
});
