/** How a board on Modbus TCP or a broker of MQTT is reached. */
import type { Group } from '../spec';

/** What stands in a new node's form, whichever kind it becomes. */
export const busesAtFirst = {
  modbus: { port: 502, unit: 1, timeout: 2, firstCoil: 0 },
  mqtt: { port: 8883, tls: true },
};

const host = (path: string, label: string) =>
  ({
    as: 'text',
    path,
    label,
    hint: 'Only one that is on the list of whoever runs this program (BUS_HOSTS).',
  }) as const;

export function modbusGroups(): Group[] {
  return [
    {
      title: 'How the board is reached',
      specs: [
        host('modbus.host', 'Address of the board'),
        { as: 'number', path: 'modbus.port', label: 'Port', quantity: 'whole' },
        {
          as: 'number',
          path: 'modbus.unit',
          label: 'Unit',
          quantity: 'whole',
          hint: 'Mostly 1; behind a gateway the number of the board, 0 to 255.',
        },
        { as: 'number', path: 'modbus.timeout', label: 'Waits for an answer', quantity: 'seconds' },
        {
          as: 'number',
          path: 'modbus.firstCoil',
          label: 'Coil of relay 1',
          quantity: 'whole',
          hint: 'As on the wire, from 0: what a data sheet calls coil 1 is 0. The other relays follow it.',
        },
      ],
    },
    {
      title: 'Watchdog register',
      note: 'A holding register that this program writes again and again; when it stops, the board drops its relays. Empty: the board has none, keeps its last state when the network fails, and takes no heater.',
      columns: 3,
      nullUnless: { path: 'modbus.watchdog', unless: 'modbus.watchdog.address' },
      specs: [
        {
          as: 'number',
          path: 'modbus.watchdog.address',
          label: 'Register',
          quantity: 'whole',
          empty: 'null',
          hint: 'From 0.',
        },
        {
          as: 'number',
          path: 'modbus.watchdog.value',
          label: 'Value to write',
          quantity: 'whole',
          empty: 'omit',
          hint: 'Empty: 1.',
        },
        {
          as: 'number',
          path: 'modbus.watchdog.within',
          label: 'The board drops after',
          quantity: 'seconds',
          hint: 'As set on the board: 3 to 60 s.',
        },
      ],
    },
  ];
}

/** @param hasPassword one is kept; it is never shown */
export function mqttGroups(hasPassword: boolean): Group[] {
  return [
    {
      title: 'How the broker is reached',
      note: 'The node signs each frame with its token, so that nobody else at the broker can speak for it.',
      specs: [
        host('mqtt.host', 'Address of the broker'),
        { as: 'number', path: 'mqtt.port', label: 'Port', quantity: 'whole', hint: 'With TLS mostly 8883.' },
        {
          as: 'check',
          path: 'mqtt.tls',
          label: 'By TLS',
          hint: 'Without it the password and every reading can be read in the network.',
        },
        { as: 'text', path: 'mqtt.user', label: 'User', empty: 'null' },
        {
          as: 'text',
          path: 'mqtt.password',
          label: 'Password',
          empty: 'omit',
          secret: true,
          hint: hasPassword ? 'One is kept. Empty: it stays.' : 'Kept sealed, and never shown again.',
        },
      ],
    },
    {
      columns: 1,
      specs: [
        {
          as: 'text',
          path: 'mqtt.ca',
          label: 'Certificate of its authority, in PEM',
          long: true,
          empty: 'null',
          hint: 'Empty: the authorities that this machine trusts.',
        },
      ],
    },
  ];
}
