/** What a node is given from outside: who it is, its clock, its sensors and its flash. */
import type { KeptRecord } from './backlog';
import type { AppTime, Clock } from './clock';
import type { KeptFallback } from './fallback';
import type { KeptLog } from './log-box';

/** What a node's flash holds over a restart, readings apart. */
export interface KeptNode {
  fallback: KeptFallback | null;
  logs: KeptLog[];
}

export interface NodeParts {
  key: string;
  token: string;
  server: string;
  relays: number;
  rate: number;
  /** interval of readings until a welcome says another, s of app time */
  reportS: number;
  clock: Clock;
  time: AppTime;
  /** readings of this moment, epoch ms of app time */
  sample(appMs: number): Array<Omit<KeptRecord, 't'>>;
  /** called just before coils change at this monotonic time: until then they were as they are */
  beforeCoilsChange(monotonicMs: number): void;
  log(event: string, fields: Record<string, unknown>): void;
  flash: { read(): KeptNode; write(kept: KeptNode): void };
}
