import { expect, it } from 'vitest';
import { boardWords, brokerTrouble, exceptionWords, linkWords, testReadWords } from '@/lib/wording/bus';

const read = { state: 'answered', words: [234], raw: 234, value: 23.4, unit: 'Cel', why: null } as const;
const plain = (text: string) => text.replaceAll('\u00a0', ' ');

it('a test reading is told with its raw number, and one that failed with its reason', () => {
  expect(plain(testReadWords({ ...read, words: [234] }))).toBe('23.4 °C, raw 234');
  expect(plain(testReadWords({ ...read, words: [1], raw: 1, value: 1, unit: '/' }))).toBe('1, raw 1');
  const failed = { ...read, words: null, raw: null, value: null, state: 'failed' } as const;
  expect(testReadWords({ ...failed, why: exceptionWords(2) })).toBe(
    'No reading: it has nothing at this address (exception 2).',
  );
  expect(testReadWords({ ...failed, words: [32_704, 0], why: 'it holds no number.' })).toBe(
    'No reading: it holds no number. It holds 32704, 0.',
  );
});

// MQTT 3.1.1, table 3.1: return codes of CONNACK
it.each([
  [{ code: 5, message: 'Connection refused: Not authorized' }, 'it does not let this user in'],
  [{ code: 4, message: '' }, 'it does not take this user and password'],
  [{ code: 'ECONNREFUSED', message: '' }, 'nothing listens there'],
  [{ code: 'CERT_HAS_EXPIRED', message: '' }, 'its certificate has expired'],
  [{ message: 'connack timeout' }, 'it does not answer as a broker does'],
  [{ code: 'EODD', message: 'something else' }, 'the connection failed (something else)'],
])('%j is told in words', (failure, words) => {
  expect(brokerTrouble(failure)).toContain(words);
});

it('a link that fails is told with its kind, and one full stop', () => {
  expect(linkWords('mqtt', 'it does not answer')).toBe('Broker: it does not answer.');
  expect(linkWords('modbus', 'it is not on the list.')).toBe('Board: it is not on the list.');
});

it('a board says what becomes of its relays', () => {
  expect(boardWords(null)).toContain('every relay stays as it last was');
  expect(plain(boardWords(20))).toContain('20 s after');
});
