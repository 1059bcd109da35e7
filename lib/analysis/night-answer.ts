import { DateTime } from 'luxon';
import type { NightSummary } from './nights';

/** A night as the interface tells it: instants with the offset of the house's zone. */
export interface NightAnswer {
  night: string;
  source: string;
  hours: number;
  onSeconds: number;
  restSeconds: number;
  dutyOfNight: number;
  dutyOfDraw: number | null;
  starts: number;
  heat: { kWh: number; sd: number } | null;
  electricity: { kWh: number } | null;
  lowest: { point: string; value: number; at: string } | null;
  belowFrostLimitSeconds: number;
  recovery: { tau: number; tauSd: number; level: number; rests: number } | null;
  coverage: number;
}

export function nightAnswer(summary: NightSummary, zone: string): NightAnswer {
  const { lowest, recovery } = summary;
  return {
    night: summary.night,
    source: summary.source,
    hours: summary.hours,
    onSeconds: summary.onSeconds,
    restSeconds: summary.restSeconds,
    dutyOfNight: summary.dutyOfNight,
    dutyOfDraw: summary.dutyOfDraw,
    starts: summary.starts,
    heat: summary.heat && { kWh: summary.heat.kWh, sd: summary.heat.sd },
    electricity: summary.electricity,
    lowest: lowest && { point: lowest.point, value: lowest.value, at: isoIn(lowest.at, zone) },
    // a number by contract; that nothing is known of it shows in `lowest`, and in the limit of the house
    belowFrostLimitSeconds: summary.belowFrostLimitSeconds ?? 0,
    recovery: recovery && {
      tau: recovery.tau,
      tauSd: recovery.tauSd,
      level: recovery.level,
      rests: recovery.rests,
    },
    coverage: summary.coverage,
  };
}

function isoIn(atMs: number, zone: string): string {
  return DateTime.fromMillis(atMs, { zone }).toISO({ suppressMilliseconds: true }) ?? '';
}
