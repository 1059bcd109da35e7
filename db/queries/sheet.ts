/** What the printed wiring sheet shows: all that is wired, each point's last calibration, and the rests of rules in force. */
import { and, desc, eq, inArray } from 'drizzle-orm';
import type { Holding } from '@/db/client';
import { calibration } from '@/db/schema/node';
import type { House } from '@/lib/schema/yard-view';
import { listRules } from './rule';
import { readWiring, type WiringPage } from './wiring-page';

export interface LastCalibration {
  /** Epoch ms; 0 for the one that the point began with. */
  from: number;
  by: string;
  residual: number | null;
}

export interface SheetPage extends WiringPage {
  /** By the point's id. */
  calibrations: Record<string, LastCalibration>;
  /** By the channel's key: of its rule in force. */
  rests: Record<string, { longestDrawS: number; leastS: number }>;
}

export async function readSheet(holding: Holding, house: House): Promise<SheetPage> {
  const wiring = await readWiring(holding, house);
  const rules = await listRules(holding, house.id);
  const rests = rules.flatMap((rule) => {
    const rest = rule.inForce?.body.rest;
    return rest === undefined
      ? []
      : [[rule.channel, { longestDrawS: rest.longestDraw, leastS: rest.least }] as const];
  });
  return {
    ...wiring,
    calibrations: await lastCalibrations(
      holding,
      wiring.points.map((one) => one.id),
    ),
    rests: Object.fromEntries(rests),
  };
}

async function lastCalibrations(holding: Holding, ids: string[]): Promise<Record<string, LastCalibration>> {
  if (ids.length === 0) return {};
  const rows = await holding.db
    .selectDistinctOn([calibration.pointId])
    .from(calibration)
    .where(and(eq(calibration.holdingId, holding.id), inArray(calibration.pointId, ids)))
    .orderBy(calibration.pointId, desc(calibration.from), desc(calibration.id));
  return Object.fromEntries(
    rows.map((row) => [row.pointId, { from: row.from.getTime(), by: row.by, residual: row.residual }]),
  );
}
