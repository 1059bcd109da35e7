/** What a noon-to-noon chart is made of, and the two frames that it is drawn in. */
import type { WatchBand, WatchLine, WatchStrip } from '@/lib/schema/watch-view';

export type Scale = (value: number) => number;

export interface NightChart {
  night: { from: number; to: number };
  now: number;
  zone: string;
  lines: WatchLine[];
  bands: WatchBand[];
  strips: WatchStrip[];
  /** The point that the house's main band goes by: drawn strongest. */
  main: string | null;
  frostLimit: number | null;
}

export interface Frame {
  width: number;
  left: number;
  right: number;
  top: number;
  /** Height of the part with temperatures. */
  plot: number;
  /** From one strip to the next, and how high a strip is. */
  stripStep: number;
  stripHeight: number;
  /** A strip's name stands over it instead of at its right. */
  namesAbove: boolean;
  everyHours: number;
}

export const WIDE: Frame = {
  ...{ width: 714, left: 38, right: 128, top: 24, plot: 248 },
  ...{ stripStep: 26, stripHeight: 14, namesAbove: false, everyHours: 3 },
};
export const NARROW: Frame = {
  ...{ width: 348, left: 34, right: 60, top: 24, plot: 196 },
  ...{ stripStep: 36, stripHeight: 14, namesAbove: true, everyHours: 6 },
};
