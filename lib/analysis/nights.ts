/**
 * Nights as they are kept and shown: the shapes that Watch, Duty, CSV, reports and the interface all read. They are made by
 * summarise.ts and house-night.ts from what was recorded, so making one again gives the same.
 */
import type { Flow } from './heat';
import type { Night } from './night';
import type { RestFit } from './rest-fit';
import type { Series } from './series';
import type { ChannelRecord, SpanKind } from './spans';

/** How a summary is made; a summary of an older make is made anew. */
export const SUMMARY_VERSION = 3;

/** Below this share of good readings, of the house's points or of a run of the loop, a night says so; its sums are of what was read, and never scaled up. */
export const LEAST_COVERAGE = 0.9;

export interface NightChannel {
  number: number;
  label: string;
  /** Of its load while on, W; null where nobody entered it. */
  powerW: number | null;
  flow: Flow | null;
  /** Keys of the points of its loop. */
  loop: { intake: string; return: string } | null;
  /** The point whose reading above this, in the point's unit, shows that the load runs. */
  runProof: { point: string; above: number } | null;
  record: ChannelRecord;
}

export interface NightHouse {
  zone: string;
  latitude: number;
  longitude: number;
  altitudeM: number;
  frostLimitC: number | null;
}

export interface NightInput {
  night: Night;
  /** Epoch ms; a night is summed up to here while it lasts. */
  nowMs: number;
  house: NightHouse;
  source: { slug: string; core: string | null; base: string | null };
  channels: NightChannel[];
  /** Every point of the house that the summary may need, by key. */
  points: ReadonlyMap<string, Series>;
}

export type Missing =
  | 'no-channel'
  | 'no-loop'
  | 'no-flow'
  | 'no-readings'
  | 'no-power'
  | 'no-limit'
  | 'no-outdoors'
  | 'no-humidity'
  | 'no-base'
  | 'no-rest'
  | 'not-fitted';

export interface NightHeat {
  kWh: number;
  sd: number;
  /** No run proof shows that the load ran: it is taken to have run whenever its relay was on. */
  assumedRunning: boolean;
}

/** kWh of heat for 1 kWh of electricity. */
export interface HeatForPower {
  ratio: number;
  sd: number;
}

/** One channel over one night. Seconds are of the channel, shares of the night or of what has passed of it. */
export interface ChannelNight {
  number: number;
  label: string;
  onSeconds: number;
  restSeconds: number;
  /** Kept off, or on, by a lock-out, an interlock, a limit, a source guard or a missing sensor. */
  heldSeconds: number;
  /** By hand, on or off. */
  handSeconds: number;
  dutyOfNight: number;
  dutyOfDraw: number | null;
  starts: number;
  /** Seconds on in which the run proof said that the load stands: no heat is booked for them. */
  standingSeconds: number;
  heat: NightHeat | null;
  electricity: { kWh: number } | null;
}

/** Heat of one run of one channel. Epoch ms. */
export interface DrawHeat {
  channel: number;
  from: number;
  to: number;
  heat: NightHeat | null;
  /** Share of the run in which both ends of the loop were read. */
  measured: number;
  standingSeconds: number;
}

/** How the house kept over a night; each null has its reason in `missing`. */
export interface NightClimate {
  /** Sum of how much warmer the house was than outdoors, over time, K·h; below nothing where it was colder. */
  liftDegreeHours: number | null;
  /** Hours in which a humidity point was over 90 %. */
  over90Hours: number | null;
  /** Hours in which a point of the house was at or under the dew point of its air: leaves are wet. */
  underDewPointHours: number | null;
}

/** τ of a night's rests taken together, s, and where they would come back to, °C. */
export interface NightRecovery {
  tau: number;
  tauSd: number;
  level: number;
  levelSd: number;
  rests: number;
}

/** One source over one night. °C, s, kWh; instants epoch ms. Nulls have their reason in `missing`. */
export interface NightSummary extends NightClimate {
  version: number;
  night: string;
  source: string;
  from: number;
  /** End of what is summed: the noon, or now. */
  to: number;
  /** Its second noon. */
  ends: number;
  complete: boolean;
  /** Of the night, or of what has passed of it. */
  hours: number;
  /** Channel-seconds, of all channels of the source. */
  onSeconds: number;
  restSeconds: number;
  heldSeconds: number;
  handSeconds: number;
  /** Share of the channels' time that they ran, 0 to 1. */
  dutyOfNight: number;
  /** Run ÷ (run + rest); null on a night with neither. */
  dutyOfDraw: number | null;
  starts: number;
  heat: NightHeat | null;
  /** Share of the run in which both ends of the loop were read. */
  heatMeasured: number | null;
  electricity: { kWh: number } | null;
  /** Of it, what was used while the heat was measured: what `heatForPower` is reckoned with. */
  heatElectricity: { kWh: number } | null;
  heatForPower: HeatForPower | null;
  lowest: { point: string; name: string; value: number; at: number } | null;
  /** Null where the house has no such limit, or nothing was read. */
  belowFrostLimitSeconds: number | null;
  outdoorsLowest: { value: number; at: number } | null;
  coreAtDawn: { value: number; at: number } | null;
  recovery: NightRecovery | null;
  rests: RestFit[];
  draws: DrawHeat[];
  channels: ChannelNight[];
  /** Share of the time in which the points that matter here had good readings, 0 to 1. */
  coverage: number;
  /** `coverage` or `heatMeasured` is under LEAST_COVERAGE. */
  coverageLow: boolean;
  /** Good readings that it was made of: where more are kept by now, it is due anew. */
  readings: number;
  missing: Partial<
    Record<
      | 'heat'
      | 'electricity'
      | 'lowest'
      | 'belowFrostLimit'
      | 'recovery'
      | 'liftDegreeHours'
      | 'over90Hours'
      | 'underDewPointHours',
      Missing
    >
  >;
  strips: { channel: number; label: string; spans: StripSpan[] }[];
}

/** One house over one night, whatever heats it. */
export interface HouseNight extends NightClimate {
  version: number;
  night: string;
  from: number;
  to: number;
  ends: number;
  complete: boolean;
  hours: number;
  lowest: { point: string; name: string; value: number; at: number } | null;
  /** Null where the house has no such limit, or nothing was read. */
  belowFrostLimitSeconds: number | null;
  belowFrostAlarmSeconds: number | null;
  outdoorsLowest: { value: number; at: number } | null;
  /** Sums of the channels that are known; null where none is. */
  heat: NightHeat | null;
  /** Share of the run in which both ends of the loops that are known were read. */
  heatMeasured: number | null;
  electricity: { kWh: number } | null;
  heatElectricity: { kWh: number } | null;
  heatForPower: HeatForPower | null;
  /** Every channel of the house, those that draw on nothing included. */
  channels: ChannelNight[];
  coverage: number;
  /** `coverage` or `heatMeasured` is under LEAST_COVERAGE. */
  coverageLow: boolean;
  readings: number;
  missing: Partial<
    Record<
      'lowest' | 'heat' | 'electricity' | 'liftDegreeHours' | 'over90Hours' | 'underDewPointHours',
      Missing
    >
  >;
}

/** Kind, begin and end in whole seconds from the night's first noon, and whether the load ran. */
export type StripSpan = [kind: SpanKind, from: number, to: number, on: boolean];
