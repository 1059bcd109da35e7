/** What cells of an archive must be beyond their column's type: what pages and control take for granted of their rows. */
import { z } from 'zod';
import { CAN_WAIT } from '@/lib/analysis/setup';
import { CLAIMS } from '@/lib/control/types';
import { ALARM_KINDS } from '@/lib/schema/alarm';
import { ModbusBus, MqttBus, Registers } from '@/lib/schema/bus';
import { Calibration } from '@/lib/schema/calibration';
import { Key, Zone } from '@/lib/schema/common';
import { HEAP_ENTRY_KINDS, HeapMaterial } from '@/lib/schema/heap';
import { HEAP_JOB_KINDS } from '@/lib/schema/heap-job';
import { COST_KINDS } from '@/lib/schema/money';
import { PointPhotograph } from '@/lib/schema/point-photograph';
import { ProbePlace, Section } from '@/lib/schema/probe-set';
import { ProofOutcome, ProofPicture, ProofRecord, ProofRun } from '@/lib/schema/proof';
import { SECTIONS, SPANS } from '@/lib/schema/report';
import { RuleBody } from '@/lib/schema/rule';
import { channelFields, InterlockCreate } from '@/lib/schema/channel';
import { houseFields } from '@/lib/schema/house';
import { nodeFields } from '@/lib/schema/node';
import { pointFields } from '@/lib/schema/point';
import { sourceFields } from '@/lib/schema/source';
import { NO_HOUSE } from './slug';

const Slug = z
  .string()
  .regex(/^[a-z0-9]+(-[a-z0-9]+)*$/, 'A slug has small letters, digits and single dashes.')
  .max(80);
const OnOff = z.enum(['on', 'off']);
const Claim = z.enum(CLAIMS);
const whole = (least: number, most: number) => z.number().int().min(least).max(most);
const seconds = whole(0, 31 * 86_400);

/** By table and column; null is judged by the column alone. */
export const CELLS: Readonly<Record<string, Readonly<Record<string, z.ZodType>>>> = {
  house: {
    slug: Slug.refine((slug) => !NO_HOUSE.includes(slug), 'This slug is the name of a page.'),
    ...{ name: houseFields.name, zone: Zone, latitude: houseFields.latitude },
    ...{ longitude: houseFields.longitude, altitude: houseFields.altitude },
    ...{ frost_limit: houseFields.frostLimit, frost_alarm: houseFields.frostAlarm },
    last_resort: houseFields.lastResort,
    setup_skipped: z.array(z.enum(CAN_WAIT)).max(CAN_WAIT.length),
  },
  node: {
    ...{ key: Key, kind: nodeFields.kind, channels: nodeFields.channels },
    report_every_s: nodeFields.reportEvery,
    ...{ modbus: ModbusBus, mqtt: MqttBus, registers: Registers },
  },
  point: {
    ...{ key: Key, name: pointFields.name, role: pointFields.role, unit: pointFields.unit },
    ...{ derived: pointFields.derived, stale_after_s: seconds, frozen_after_s: seconds },
  },
  calibration: {
    ...{ offset: pointFields.offset, gain: pointFields.gain },
    ...{ kind: Calibration.shape.kind, places: Calibration.shape.places },
    note: z.string().max(500),
  },
  attachment: {
    shows: z.enum([...PointPhotograph.shape.shows.options, ...ProofPicture.shape.shows.options]),
  },
  source: { slug: Slug, name: sourceFields.name, kind: sourceFields.kind },
  channel: {
    ...{ number: channelFields.number, relay: channelFields.relay, key: Key, label: channelFields.label },
    ...{ contact: channelFields.contact, load: channelFields.load, high_limit: channelFields.highLimit },
    ...{ run_proof: channelFields.runProof, fallback: channelFields.fallback, flow: channelFields.flow },
    protection: channelFields.protection,
    ...{ min_on_s: seconds, min_off_s: seconds, longest_on_s: seconds },
  },
  loop: { slug: Slug },
  interlock: { kind: InterlockCreate.shape.kind, delay_s: seconds },
  rule: { slug: Slug },
  rule_version: {
    ...{ status: z.enum(['draft', 'in-force', 'retired']), body: RuleBody, number: whole(1, 1e6) },
    unproved: z.strictObject({ by: z.string(), at: z.string(), words: z.string().nullable() }),
  },
  proof: {
    ...{ outcome: ProofOutcome, records: z.array(ProofRecord).max(500), runs: z.array(ProofRun).max(500) },
    wiring: z.looseObject({ node: Key, relay: whole(1, 64) }),
  },
  heap_entry: { kind: z.enum(HEAP_ENTRY_KINDS), materials: z.array(HeapMaterial).max(20) },
  probe_set: { section: Section, places: z.array(ProbePlace) },
  heap_job: {
    kind: z.enum(HEAP_JOB_KINDS),
    checklist: z.array(
      z.strictObject({ text: z.string(), doneAt: z.string().nullable(), doneBy: z.string().nullable() }),
    ),
  },
  heap_cost: { kind: z.enum(COST_KINDS), years: whole(1, 100) },
  report_schedule: {
    ...{ span: z.enum(SPANS), sections: z.array(z.enum(SECTIONS)) },
    to: z.array(z.string().max(320)).max(100),
  },
  alarm: { kind: z.enum(ALARM_KINDS), about: z.record(z.string(), z.string()), data: z.looseObject({}) },
  alarm_event: { kind: z.enum(['raised', 'acknowledged', 'cleared']) },
  import_batch: { state: z.enum(['done', 'undone', 'failed']) },
  switching: { from: OnOff, to: OnOff, claim: Claim, explanation: z.looseObject({}) },
  decision: { state: OnOff, claim: Claim, explanation: z.looseObject({}) },
  relay_report: { state: OnOff },
};
