import type { LastProof } from '@/components/wiring/proved-cell';
import type {
  Channel,
  FieldNode,
  House,
  Interlock,
  Lockout,
  Loop,
  Point,
  Source,
} from '@/lib/schema/yard-view';

/** What the sheet is made of: all that is wired, with what was calibrated and what rests. */
export interface SheetData {
  house: House;
  nodes: FieldNode[];
  points: Point[];
  sources: Source[];
  channels: Channel[];
  loops: Loop[];
  interlocks: Interlock[];
  lockouts: Lockout[];
  calibrations: Record<string, { from: number; by: string; residual: number | null }>;
  /** Who proved a channel, and what its gain run brought, by the channel's id. */
  proofs: Record<string, LastProof>;
  rests: Record<string, { longestDrawS: number; leastS: number }>;
}
