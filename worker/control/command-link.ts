import type { BootId, CommandFrame } from '@/lib/field/frames';

/** One connection of a node, as control sees it. */
export interface CommandLink {
  readonly boot: BootId;
  readonly canFallback: boolean;
  /** The latest `relays` frame on this connection: its seq, and when it came (app time); null before the first. */
  readonly seen: { seq: number; at: number } | null;
  /** @param madeAtMs monotonic; a command that would leave late is not sent */
  sendCommand(frame: CommandFrame, madeAtMs: number): void;
  close(code: number, why: string): void;
}
