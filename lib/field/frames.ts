import { z } from 'zod';

/**
 * Every frame of the field protocol, version 1, in both directions. A frame is one JSON object in one
 * WebSocket text message. Times are Unix seconds, spans are seconds.
 *
 * The pack of a `readings` frame is only checked to be a list here: SenML asks that one bad record be
 * refused by itself while the rest is kept, so records are judged in `senml.ts`, one by one.
 */

export const fieldPath = '/field/v1';
export const fieldReadingsPath = '/field/v1/readings';
export const senmlMediaType = 'application/senml+json';

export const frameBytesMax = 64 * 1024;
export const packRecordsMax = 100;
export const closeCode = { policy: 1008, tooBig: 1009, takenOver: 4001 } as const;
export const malformedPerMinuteMax = 10;

/** Seconds of app time: they shrink with `rate`. */
export const leaseS = 30;
export const relaysEveryS = 10;
/** Milliseconds of real time, whatever the rate: they guard the line, not the load. */
export const pingEveryMs = 10_000;
export const silenceMs = 25_000;
export const takenOverWaitMs = 60_000;

const epochStep = 2 ** 32;

/**
 * The number of a command: epoch × 2^32 + counter. Multiplied, since a shift would cut it to 32 bits.
 * `counter` is 0 to 2^32 − 1, `epoch` 0 to 2^21 − 1, so that the number stays a safe integer.
 * @throws RangeError outside these ranges.
 * @example commandNumber(3, 17) === 12884901905
 */
export function commandNumber(epoch: number, counter: number): number {
  const fits =
    Number.isInteger(epoch) && Number.isInteger(counter) && epoch >= 0 && counter >= 0 && counter < epochStep;
  const number = epoch * epochStep + counter;
  if (!fits || !Number.isSafeInteger(number)) {
    throw new RangeError(`no command number for epoch ${epoch}, counter ${counter}`);
  }
  return number;
}

/** The epoch in which a command number was given out. @example epochOf(12884901905) === 3 */
export function epochOf(number: number): number {
  return Math.floor(number / epochStep);
}

const seq = z.number().int().nonnegative();
const number = z.number().int().nonnegative();
// A node may count its boots or draw an id: whichever it sends comes back to it unchanged.
const boot = z.union([z.string().min(1).max(100), z.number().int()]);
const relayNumber = z.string().regex(/^[1-9][0-9]{0,3}$/, 'is not a relay number');
const coil = z.enum(['on', 'off']);
const coils = z.record(relayNumber, coil);

export const helloFrame = z.strictObject({
  type: z.literal('hello'),
  // The count runs over all frames of a boot, so a node may number its hello too.
  seq: seq.optional(),
  node: z.string().min(1).max(100),
  firmware: z.string().max(200),
  channels: z.number().int().min(0).max(9999),
  boot,
  clock: z.number().nonnegative().nullable(),
  can: z.array(z.string().max(40)).max(20).optional(),
});

export const readingsFrame = z.strictObject({
  type: z.literal('readings'),
  seq,
  pack: z.array(z.unknown()),
});

export const relaysFrame = z.strictObject({
  type: z.literal('relays'),
  seq,
  channels: coils,
  // A node that has seen no command yet says 0; null says the same.
  number: number.nullable().transform((seen) => seen ?? 0),
  trips: z.number().int().nonnegative(),
});

export const logFrame = z.strictObject({
  type: z.literal('log'),
  seq,
  level: z.string().min(1).max(20),
  // The frame's own size is the limit; what is kept of it is the reader's business.
  text: z.string(),
});

export const nodeFrame = z.discriminatedUnion('type', [helloFrame, readingsFrame, relaysFrame, logFrame]);

export const welcomeFrame = z.strictObject({
  type: z.literal('welcome'),
  now: z.number().nonnegative(),
  rate: z.number().positive(),
  lease: z.number().positive(),
  report: z.number().positive(),
  /** By way of a broker only: of the lead that answers. */
  epoch: z.number().int().nonnegative().optional(),
});

export const refusedRecord = z.strictObject({
  index: z.number().int().nonnegative(),
  name: z.string(),
  why: z.string(),
});

/** Answers `readings`, once they are durable. */
export const readingsAckFrame = z.strictObject({
  type: z.literal('ack'),
  seq,
  stored: z.number().int().nonnegative(),
  duplicate: z.number().int().nonnegative(),
  refused: z.array(refusedRecord),
});

/** Answers `log`. */
export const logAckFrame = z.strictObject({ type: z.literal('ack'), seq });

/** A small thermostat that the node runs by itself while nobody speaks to it: °C and seconds. */
export const fallbackSetting = z.strictObject({
  point: z.string().min(1),
  below: z.number(),
  above: z.number(),
  onFor: z.number().positive(),
  offFor: z.number().nonnegative(),
});

export const commandFrame = z.strictObject({
  type: z.literal('command'),
  number,
  lease: z.number().positive(),
  boot,
  seen: seq,
  channels: coils,
  fallback: z.record(relayNumber, fallbackSetting).optional(),
});

export const errorFrame = z.strictObject({
  type: z.literal('error'),
  why: z.string(),
  seq: seq.optional(),
  /** By way of a broker only, where no line is seen to end: say hello again. */
  hello: z.boolean().optional(),
});

export const serverFrame = z.union([welcomeFrame, readingsAckFrame, logAckFrame, commandFrame, errorFrame]);

export type BootId = z.infer<typeof boot>;
export type Coil = z.infer<typeof coil>;
/** Coils by the node's own relay number, as text: JSON has no other keys. */
export type Coils = Record<string, Coil>;
export type HelloFrame = z.infer<typeof helloFrame>;
export type ReadingsFrame = z.infer<typeof readingsFrame>;
export type RelaysFrame = z.infer<typeof relaysFrame>;
export type LogFrame = z.infer<typeof logFrame>;
export type NodeFrame = z.infer<typeof nodeFrame>;
export type WelcomeFrame = z.infer<typeof welcomeFrame>;
export type RefusedRecord = z.infer<typeof refusedRecord>;
export type ReadingsAckFrame = z.infer<typeof readingsAckFrame>;
export type LogAckFrame = z.infer<typeof logAckFrame>;
export type FallbackSetting = z.infer<typeof fallbackSetting>;
export type CommandFrame = z.infer<typeof commandFrame>;
export type ErrorFrame = z.infer<typeof errorFrame>;
export type ServerFrame = z.infer<typeof serverFrame>;

export type ParsedFrame<Frame> = { ok: true; frame: Frame } | { ok: false; why: string; seq?: number };

/**
 * Reads one text message sent by a node. A malformed one gives the reason, and its `seq` where that can
 * still be read, so that the answer can name it. The size is the socket's business (`frameBytesMax`).
 */
export function parseNodeFrame(text: string): ParsedFrame<NodeFrame> {
  const body = fromJson(text);
  if (body === undefined) return NOT_JSON;
  // nearly all that a server reads are these, and the schema takes as long as the step that follows
  const readings = soundReadings(body);
  return readings === null ? readFrame(nodeFrame, body) : { ok: true, frame: readings };
}

/** Reads one text message sent by the server to a node; as `parseNodeFrame`. */
export function parseServerFrame(text: string): ParsedFrame<ServerFrame> {
  return parseFrame(serverFrame, text);
}

function parseFrame<Frame>(schema: z.ZodType<Frame>, text: string): ParsedFrame<Frame> {
  const body = fromJson(text);
  return body === undefined ? NOT_JSON : readFrame(schema, body);
}

const NOT_JSON = { ok: false, why: 'not JSON' } as const;

/** @returns undefined for what is not JSON: no JSON says that */
function fromJson(text: string): unknown {
  try {
    return JSON.parse(text);
  } catch {
    return undefined;
  }
}

/** A readings frame without fault, as its schema would read it; null leaves it to that, which also tells the fault. */
function soundReadings(body: unknown): ReadingsFrame | null {
  if (typeof body !== 'object' || body === null || Object.keys(body).length !== 3) return null;
  if (!('type' in body && 'seq' in body && 'pack' in body) || body.type !== 'readings') return null;
  const { seq, pack } = body;
  const isSeq = typeof seq === 'number' && Number.isSafeInteger(seq) && seq >= 0;
  return isSeq && Array.isArray(pack) ? { type: 'readings', seq, pack } : null;
}

function readFrame<Frame>(schema: z.ZodType<Frame>, body: unknown): ParsedFrame<Frame> {
  const parsed = schema.safeParse(body);
  if (parsed.success) return { ok: true, frame: parsed.data };
  const first = parsed.error.issues[0];
  const where = first?.path.join('.') ?? '';
  const why = where === '' ? (first?.message ?? 'not a frame') : `${where}: ${first?.message ?? 'is wrong'}`;
  const named = z.looseObject({ seq }).safeParse(body);
  return named.success ? { ok: false, why, seq: named.data.seq } : { ok: false, why };
}
