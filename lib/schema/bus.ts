/** How a board on Modbus TCP or a broker of MQTT is reached, and what is read of a board. */
import { z } from 'zod';
import { isWireUnit } from '@/lib/field/units';
import { finite, isSeen, Key, SEEN, wholeSeconds } from './common';

const Host = z
  .string()
  .trim()
  .regex(
    /^[A-Za-z0-9:][A-Za-z0-9.:-]{0,252}$/,
    'Give a host name or an address without its port, such as 192.0.2.10.',
  );
const whole = (least: number, most: number) =>
  z
    .number({ error: 'Give a whole number.' })
    .int('Give a whole number.')
    .min(least, `At least ${least}.`)
    .max(most, `At most ${most}.`);
const Port = whole(1, 65_535);
/** As on the wire, from 0: what a data sheet calls coil 1 or register 40001 is 0. */
export const ADDRESS_LAST = 65_535;
const Address = whole(0, ADDRESS_LAST);

/** Slower than a minute is no guard of a load. */
const WATCHDOG_LONGEST_S = 60;

export const ModbusBus = z.strictObject({
  host: Host,
  port: Port.default(502),
  unit: whole(0, 255).default(1),
  timeout: wholeSeconds(1, 30).default(2),
  /** Address of the coil of relay 1; the others follow it. */
  firstCoil: Address.default(0),
  /** A holding register that has to be written again `within` so many seconds, else the board drops its coils. */
  watchdog: z
    .strictObject({
      address: Address,
      value: whole(0, 65_535).default(1),
      within: wholeSeconds(3, WATCHDOG_LONGEST_S),
    })
    .nullable()
    .default(null),
});
export type ModbusBus = z.infer<typeof ModbusBus>;

const mqttFields = {
  host: Host,
  port: Port,
  tls: z.boolean(),
  /** Certificates in PEM that the broker's is signed by; null: those that this machine trusts. */
  ca: z
    .string()
    .trim()
    .max(20_000, 'At most 20,000 characters.')
    .regex(
      /^-----BEGIN CERTIFICATE-----[\sA-Za-z0-9+/=-]*-----END CERTIFICATE-----$/,
      'Paste the certificate in PEM, from -----BEGIN CERTIFICATE----- to -----END CERTIFICATE-----.',
    )
    .nullable(),
  user: z
    .string()
    .trim()
    .min(1, 'Give a name, or leave it out.')
    .max(200, 'At most 200 characters.')
    .refine(isSeen, SEEN)
    .nullable(),
};
/** As it is kept; its password is kept apart, sealed. */
export const MqttBus = z.strictObject(mqttFields);
export type MqttBus = z.infer<typeof MqttBus>;
/** As it is given: a password that is left out stays as it is, null takes it away. */
export const MqttGiven = z.strictObject({
  host: Host,
  port: Port.default(8883),
  tls: z.boolean().default(true),
  ca: mqttFields.ca.default(null),
  user: mqttFields.user.default(null),
  password: z
    .string()
    .min(1, 'Type the password, or leave it out.')
    .max(1000, 'At most 1000 characters.')
    .nullable()
    .optional(),
});
export type MqttGiven = z.infer<typeof MqttGiven>;
/** As it is told. */
export const MqttTold = z.strictObject({ ...mqttFields, hasPassword: z.boolean() });

export const REGISTER_TABLES = ['coil', 'discrete', 'input', 'holding'] as const;
export const REGISTER_TYPES = ['bit', 'u16', 's16', 'u32', 's32', 'f32'] as const;
export const WORD_ORDERS = ['high-first', 'low-first'] as const;

const registerFields = {
  table: z.enum(REGISTER_TABLES),
  address: Address,
  type: z.enum(REGISTER_TYPES),
  /** Of a value of two registers: which of them comes first. */
  wordOrder: z.enum(WORD_ORDERS).default('high-first'),
  scale: finite(-1e9, 1e9, 'units')
    .refine((scale) => scale !== 0, 'Not 0: every value would be the same.')
    .default(1),
  offset: finite(-1e9, 1e9, 'units').default(0),
  /** Of the value that comes of it, by its SenML name. */
  unit: z.string().refine(isWireUnit, 'Give a SenML unit, such as Cel, %RH, A, Pa or / for on and off.'),
};

interface Shape {
  table: (typeof REGISTER_TABLES)[number];
  type: (typeof REGISTER_TYPES)[number];
  address: number;
}

function judge({ table, type, address }: Shape, issue: (path: string, message: string) => void): void {
  const isBit = table === 'coil' || table === 'discrete';
  if (isBit && type !== 'bit') issue('type', 'A coil or a discrete input is one bit.');
  if (!isBit && type === 'bit') issue('type', 'A register is a number: u16, s16, u32, s32 or f32.');
  if (/32$/.test(type) && address === 65_535)
    issue('address', 'A value of 32 bits takes two registers; 65535 is the last one.');
}

/** One value of a board, and how it is read: raw × scale + offset. */
export const Register = z
  .strictObject({ point: Key, ...registerFields })
  .superRefine((register, context) =>
    judge(register, (path, message) => context.addIssue({ code: 'custom', path: [path], message })),
  );
export type Register = z.infer<typeof Register>;

export const REGISTERS_MOST = 120;
export const Registers = z
  .array(Register)
  .max(REGISTERS_MOST, `At most ${REGISTERS_MOST} rows.`)
  .superRefine((registers, context) => {
    registers.forEach(({ point }, row) => {
      if (registers.findIndex((one) => one.point === point) < row)
        context.addIssue({
          code: 'custom',
          path: [row, 'point'],
          message: `${point} has a row already: a point is read from one place.`,
        });
    });
  });

/** One reading that somebody at the panel asks for; it is stored nowhere. */
export const TestReadCreate = z
  .strictObject({ node: z.string().min(1).max(140), ...registerFields })
  .superRefine((register, context) =>
    judge(register, (path, message) => context.addIssue({ code: 'custom', path: [path], message })),
  );
export type TestReadCreate = z.infer<typeof TestReadCreate>;

export const TestRead = z.strictObject({
  id: z.string(),
  node: z.string(),
  state: z.enum(['asked', 'answered', 'failed']),
  /** As the board gave them, the first one first; null until it has. */
  words: z.array(z.number()).nullable(),
  raw: z.number().nullable(),
  /** Null too for what is no number. */
  value: z.number().nullable(),
  unit: z.string(),
  /** Why there is no value, in words. */
  why: z.string().nullable(),
});
export type TestRead = z.infer<typeof TestRead>;
