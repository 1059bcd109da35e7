/** What Watch is made of: read once by the server, and kept up to date in the browser by the live feed. */
import type { Alone } from '@/lib/analysis/alone';
import type { NightSummary } from '@/lib/analysis/nights';
import type { SpanKind } from '@/lib/analysis/spans';
import type { HouseState } from './house-state';

export interface WatchHouse {
  id: string;
  slug: string;
  name: string;
  zone: string;
  frostLimit: number | null;
  frostAlarm: number | null;
}

export interface WatchPoint {
  key: string;
  name: string;
  role: string;
  unit: string;
}

/** What does not change with every reading: how a channel is wired and ruled. */
export interface WatchChannel {
  number: number;
  key: string;
  label: string;
  loadKind: string;
  watts: number | null;
  contact: 'NO' | 'NC';
  source: string | null;
  frostHelp: boolean;
  minOnS: number;
}

export interface WatchSource {
  slug: string;
  name: string;
  kind: string;
  core: string | null;
  base: string | null;
  coreFloor: number | null;
}

export interface WatchLoop {
  source: string | null;
  channel: string | null;
  intake: string | null;
  return: string | null;
  /** W that one degree between its ends is worth while its fan runs; null where nobody entered a flow. */
  wattPerK: number | null;
}

/** A band in force over a part of the night, °C. Thresholds change with the hours and with a new version. */
export interface WatchBand {
  point: string;
  channel: string;
  purpose: 'warm' | 'cool';
  periods: { from: number; to: number; low: number; high: number }[];
}

export interface WatchLine {
  key: string;
  name: string;
  role: string;
  /** Epoch ms and °C, ascending; a break in the readings is a null. */
  at: number[];
  value: (number | null)[];
}

export interface WatchStrip {
  channel: number;
  key: string;
  label: string;
  spans: { kind: SpanKind; from: number; to: number; on: boolean }[];
}

export interface WatchAlarm {
  id: string;
  kind: string;
  about: { point?: string; channel?: string; source?: string; node?: string };
  data: Record<string, unknown>;
  raisedAt: number;
  acknowledgedAt: number | null;
  acknowledgedBy: string | null;
}

/** Another house of the holding, in one line. */
export interface WatchCard {
  slug: string;
  name: string;
  zone: string;
  /** The coldest house point that is good. */
  coldest: number | null;
  frostLimit: number | null;
  alarms: number;
  running: string[];
  /** Epoch ms of the state that this is from. */
  at: number | null;
  /** Out of an archive and not put in service yet: nobody controls it. */
  isLaidUp: boolean;
}

export interface WatchView {
  house: WatchHouse;
  /** App time, epoch ms, and app seconds a real second. */
  now: number;
  rate: number;
  night: { night: string; from: number; to: number };
  state: HouseState | null;
  /** Whether a worker leads and its heart beats; real seconds since the last beat, null if none ever led. */
  control: { runs: boolean; silentS: number | null };
  points: WatchPoint[];
  channels: WatchChannel[];
  sources: WatchSource[];
  loops: WatchLoop[];
  bands: WatchBand[];
  lines: WatchLine[];
  strips: WatchStrip[];
  alarms: WatchAlarm[];
  /** This night so far, one a source: the very rows that Duty shows. */
  nights: NightSummary[];
  /** Times of this night in which field boxes kept the house by themselves, ascending. */
  alone: Alone[];
  others: WatchCard[];
}
