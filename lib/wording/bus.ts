/** Boards and brokers in words: why there is no link, what a board answers, and what it does when the network fails. */

/** Of the failures of a connection that people can mend, by Node's codes. */
const CONNECTION: Record<string, string> = {
  ECONNREFUSED: 'nothing listens there: look at the address, the port, and whether it is switched on',
  ECONNRESET: 'it closed the connection',
  EPIPE: 'it closed the connection',
  ETIMEDOUT: 'it does not answer',
  EHOSTUNREACH: 'there is no way to it in this network',
  ENETUNREACH: 'there is no way to it in this network',
  EHOSTDOWN: 'there is no way to it in this network',
  ENOTFOUND: 'nobody knows that name',
  EAI_AGAIN: 'names cannot be looked up now',
};
const CERTIFICATE: Record<string, string> = {
  DEPTH_ZERO_SELF_SIGNED_CERT: 'its certificate is signed by itself: give that certificate as the authority',
  SELF_SIGNED_CERT_IN_CHAIN:
    'its certificate is signed by an authority that is not known here: give that one',
  UNABLE_TO_VERIFY_LEAF_SIGNATURE:
    'its certificate is signed by an authority that is not known here: give that one',
  UNABLE_TO_GET_ISSUER_CERT_LOCALLY:
    'its certificate is signed by an authority that is not known here: give that one',
  CERT_HAS_EXPIRED: 'its certificate has expired',
  CERT_NOT_YET_VALID: 'its certificate is not valid yet: look at the clocks',
  ERR_TLS_CERT_ALTNAME_INVALID: 'its certificate is made out to another name than this host',
  EPROTO: 'it speaks no TLS on this port',
  ERR_SSL_WRONG_VERSION_NUMBER: 'it speaks no TLS on this port',
};
/** Answers to CONNECT: MQTT 3.1.1, table 3.1. */
const REFUSED: Record<number, string> = {
  1: 'it does not speak MQTT 3.1.1',
  2: 'it does not take the name of this client',
  3: 'it is not ready',
  4: 'it does not take this user and password',
  5: 'it does not let this user in',
};

/** What Node's and the packages' errors have in common. */
export interface Failure {
  message: string;
  code?: unknown;
}

/** @example connectionTrouble({ code: 'ECONNREFUSED', message: '…' }) */
export function connectionTrouble({ code, message }: Failure): string {
  return CONNECTION[String(code)] ?? `the connection failed (${message.slice(0, 120)})`;
}

/** Why a broker is not there, in words that follow its name and a colon. */
export function brokerTrouble(failure: Failure): string {
  const { code, message } = failure;
  if (typeof code === 'number') return REFUSED[code] ?? `it refuses the connection (${code})`;
  if (/connack timeout/i.test(message)) return 'it does not answer as a broker does';
  return CERTIFICATE[String(code)] ?? connectionTrouble(failure);
}

/** Exceptions of a board: Modbus Application Protocol V1.1b3, section 7. */
const EXCEPTIONS: Record<number, string> = {
  1: 'it does not know this function',
  2: 'it has nothing at this address',
  3: 'it does not take this value or this many',
  4: 'it failed at this',
  5: 'it has taken the request and is not done yet',
  6: 'it is busy',
  8: 'its memory has a parity error',
  10: 'the gateway has no way to this unit',
  11: 'the unit behind the gateway does not answer',
};

/** @example exceptionWords(2) === 'it has nothing at this address (exception 2)' */
export function exceptionWords(code: number): string {
  return `${EXCEPTIONS[code] ?? 'it refuses'} (exception ${code})`;
}

const TABLES: Record<string, string> = {
  coil: 'coil',
  discrete: 'discrete input',
  input: 'input register',
  holding: 'holding register',
};

/** @example placeWords('input', 30) === 'input register 30' */
export function placeWords(table: string, address: number): string {
  return `${TABLES[table] ?? table} ${address}`;
}

/** What becomes of a board's relays when the network fails. */
export function boardWords(watchdogS: number | null): string {
  return watchdogS === null
    ? 'It has no watchdog: when the network fails, every relay stays as it last was. No heaters on it.'
    : `Its watchdog drops every relay ${watchdogS}\u00a0s after it was last spoken to.`;
}

/** On the relay board of one without watchdog. */
export const NO_WATCHDOG =
  'This board has no watchdog: when the network fails, or this program ends without a word, every relay stays as it last was. Its isolator is the only sure way to stop a load.';

/** @example linkWords('mqtt', 'it does not answer') === 'Broker: it does not answer.' */
export function linkWords(kind: string, trouble: string): string {
  return `${kind === 'mqtt' ? 'Broker' : 'Board'}: ${trouble.replace(/\.$/, '')}.`;
}

const UNITS: Record<string, string> = {
  Cel: '°C',
  Far: '°F',
  '%RH': '% RH',
  '/': '',
  'W/m2': 'W/m²',
  'm3/s': 'm³/s',
};

export interface ReadFacts {
  state: 'asked' | 'answered' | 'failed';
  words: number[] | null;
  raw: number | null;
  value: number | null;
  unit: string;
  why: string | null;
}

/** @example testReadWords({ state: 'answered', value: 23.4, unit: 'Cel', raw: 234, … }) === '23.4 °C, raw 234' */
export function testReadWords({ state, words, raw, value, unit, why }: ReadFacts): string {
  if (state === 'asked') return 'Asked; the board has not answered yet.';
  if (state === 'failed' || value === null) {
    const held = words === null ? '' : ` It holds ${words.join(', ')}.`;
    const said = why ?? 'no reason was told';
    return `No reading: ${said.replace(/\.$/, '')}.${held}`;
  }
  const named = UNITS[unit] ?? unit;
  const space = '\u00a0';
  return `${value}${named === '' ? '' : space + named}, raw ${raw ?? words?.join(', ') ?? 'not told'}`;
}

export const TABLE_WORDS: Record<string, string> = {
  coil: 'Coil',
  discrete: 'Discrete input',
  input: 'Input register',
  holding: 'Holding register',
};
export const TYPE_WORDS: Record<string, string> = {
  bit: 'one bit, on or off',
  u16: '16 bits, never negative',
  s16: '16 bits, with sign',
  u32: '32 bits, never negative',
  s32: '32 bits, with sign',
  f32: '32 bits, floating point',
};
export const ORDER_WORDS: Record<string, string> = {
  'high-first': 'high register first',
  'low-first': 'low register first',
};
