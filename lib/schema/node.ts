import { z } from 'zod';
import { ModbusBus, MqttGiven, Registers } from './bus';
import { Key, wholeSeconds } from './common';

export const NODE_KINDS = ['socket', 'http', 'modbus', 'mqtt'] as const;
export const nodeFields = {
  key: Key,
  kind: z.enum(NODE_KINDS),
  reportEvery: wholeSeconds(1, 3600),
  channels: z.number().int().min(0).max(64),
};
/** Only of a node on that bus; null: it is not told yet how it is reached. */
const busFields = { modbus: ModbusBus.nullable(), mqtt: MqttGiven.nullable(), registers: Registers };

export const NodeCreate = z
  .strictObject({
    ...nodeFields,
    reportEvery: nodeFields.reportEvery.default(30),
    channels: nodeFields.channels.default(8),
    modbus: busFields.modbus.default(null),
    mqtt: busFields.mqtt.default(null),
    registers: busFields.registers.default([]),
  })
  .superRefine(({ kind, modbus, mqtt, registers }, context) => {
    const refuse = (path: string, message: string) =>
      context.addIssue({ code: 'custom', path: [path], message });
    if (modbus !== null && kind !== 'modbus') refuse('modbus', 'Only a node of kind modbus has this.');
    if (mqtt !== null && kind !== 'mqtt') refuse('mqtt', 'Only a node of kind mqtt has this.');
    if (registers.length > 0 && kind !== 'modbus')
      refuse('registers', 'Only a node of kind modbus has registers.');
  });
export const NodeAmend = z
  .strictObject({ ...nodeFields, ...busFields })
  .omit({ kind: true })
  .partial();
