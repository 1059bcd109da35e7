import { fahrenheit, fahrenheitDifference } from '@/lib/units/conversion';
import { USUAL, type Preferences } from '@/lib/units/preferences';
import type { RuleBody } from '../rule-body';
import type { ChannelConfig, HouseConfig } from '../types';

/** A thing to look at, or to stop for, before a rule goes into force. */
export interface Finding {
  level: 'stop' | 'look';
  /** Which check found it. */
  kind: string;
  /** What is wrong and what to do, in the words that people read and in their degrees. */
  text: string;
  /** Where in the body, dotted: `band.0.low`. */
  paths: string[];
}

/** What the configuration alone does not say. Whatever is left out is not checked. */
export interface CheckContext {
  /** By channel key. */
  channels?: Record<string, ChannelFacts>;
  /** By point key: the greatest value of the last 14 nights. */
  greatest?: Record<string, number>;
  /** Keys of points whose readings are corrected: what their sensor can say is not what conditions see. */
  corrected?: readonly string[];
  /** The thermostat of last resort: what it is set to, °C, and whether somebody saw it work. Null: there is none. */
  lastResort?: { below: number; isProved: boolean } | null;
  /** How much warmer than outdoors the rule's point gets at most while the channel runs, K. */
  liftK?: number;
  /** The coldest outdoors that is to be expected, °C. */
  coldestOutdoors?: number;
  /** How the house answers the fan: time constant, s, and rise from off for good to on for good, K. */
  response?: { tauS: number; riseK: number };
  /** The reader's degrees, for the texts; °C where nobody says. */
  preferences?: Preferences;
}

export interface ChannelFacts {
  proved?: boolean;
  startsPerHour?: number | null;
  volts?: number | null;
  supply?: 'ac' | 'dc' | null;
  contactAmps?: number | null;
  hasFallback?: boolean;
}

export interface RuleToCheck {
  /** The rule's id, where it has one: its own version in force is not compared with it. */
  id?: string;
  /** Key of its channel. */
  channel: string;
  body: RuleBody;
}

export interface CheckInput {
  config: HouseConfig;
  rule: RuleToCheck;
  channel: ChannelConfig | null;
  context: CheckContext;
  say: Say;
}

/** Figures of a finding, as its reader reads them. */
export interface Say {
  /** @example say.temperature(-1.667) is "−1.7 °C", or "29 °F" */
  temperature: (celsius: number) => string;
  difference: (kelvin: number) => string;
}

export function sayIn({ temperature }: Preferences = USUAL): Say {
  const unit = temperature === 'F' ? '°F' : '°C';
  // without a tail of digits: "4 °C", for what was typed so
  const figure = (value: number) => `${Math.round(value * 10) / 10} ${unit}`.replace('-', '−');
  return {
    temperature: (celsius) => figure(temperature === 'F' ? fahrenheit(celsius) : celsius),
    difference: (kelvin) => figure(temperature === 'F' ? fahrenheitDifference(kelvin) : kelvin),
  };
}

export const look = (kind: string, paths: string[], text: string): Finding => ({
  level: 'look',
  kind,
  text,
  paths,
});
export const stop = (kind: string, paths: string[], text: string): Finding => ({
  level: 'stop',
  kind,
  text,
  paths,
});

/** `40 min`, `90 s`, `2 h 30 min`. */
export function lasting(seconds: number): string {
  if (seconds < 120) return `${seconds} s`;
  const minutes = Math.round(seconds / 60);
  if (minutes < 120) return `${minutes} min`;
  return minutes % 60 === 0 ? `${minutes / 60} h` : `${Math.floor(minutes / 60)} h ${minutes % 60} min`;
}
