import { createHash, createHmac } from 'node:crypto';
import { expect, it } from 'vitest';
import { signedText, splitMac, topicsOf, withMac } from '@/lib/field/signed';
import { macOf } from '@/worker/field/mqtt-line';

const frame = '{"type":"hello","node":"LH-1"}';

it('a signed frame is the frame with one key more, and comes apart again', () => {
  const mac = 'ab'.repeat(32);
  const text = withMac(frame, mac);
  expect(JSON.parse(text)).toEqual({ type: 'hello', node: 'LH-1', mac });
  expect(splitMac(text)).toEqual({ frame, mac });
});

it.each([frame, '', '{}', '{"mac":"ab"}', `{"mac":"${'a'.repeat(64)}","type":"hello"}`])(
  'without a signature at its end there is none: %s',
  (text) => {
    expect(splitMac(text)).toBeNull();
  },
);

it('the mac is what docs/buses.md says: HMAC-SHA-256 under the token’s SHA-256 in hex', () => {
  const { up } = topicsOf('018f3f3f-0000-7000-8000-000000000001');
  expect(up).toBe('middenward/v1/018f3f3f-0000-7000-8000-000000000001/up');
  const key = createHash('sha256').update('token').digest('hex');
  expect(signedText(up, 'before', frame)).toBe(`${up}\nbefore\n${frame}`);
  const expected = createHmac('sha256', key).update(`${up}\nbefore\n${frame}`).digest('hex');
  expect(macOf(key, up, 'before', frame)).toBe(expected);
});

it('HMAC-SHA-256 itself is that of RFC 4231, test case 2', () => {
  const mac = createHmac('sha256', 'Jefe').update('what do ya want for nothing?').digest('hex');
  expect(mac).toBe('5bdcc146bf60754e6a042426089575c75a003f089d2739839dec58b964ec3843');
});
