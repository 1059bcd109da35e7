/** How a house stands, as the sentence of Watch needs it. */
export interface StandingPoint {
  key: string;
  role: string;
  /** °C for temperatures, else in the point's own unit. */
  value: number | null;
  /** ISO 8601 of its reading. */
  at: string | null;
  quality: 'good' | 'uncertain' | 'bad';
  why: string | null;
}

export interface StandingChannel {
  key: string;
  label: string;
  state: 'on' | 'off';
  claim: string;
  because: unknown;
  mode: 'auto' | 'hand' | 'locked';
}

export interface HouseStanding {
  houseName: string;
  frostLimit: number | null;
  points: StandingPoint[];
  channels: StandingChannel[];
  /** The warming band that decides now, and its point: what "inside its band" is said of. */
  band: { point: string; low: number; high: number } | null;
  /** Channels of heaps, each with the point beside its pipe: these are spoken of, others only when they run. */
  draws: { channel: string; base: string | null }[];
  /** The coldest outdoors of the night so far; `at` epoch ms. */
  coldest: { value: number; at: number } | null;
}
