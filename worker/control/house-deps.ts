import type { HouseRecord } from '@/db/queries/plan';
import type { StepResult } from '@/lib/control/step-result';
import type { State } from '@/lib/control/types';
import type { TailRecord } from '@/lib/live/frames';
import type { HouseState } from '@/lib/schema/house-state';
import type { AlarmKeeper } from '../alarms/keeper';
import type { Base } from '../base';
import type { Journal } from './journal';

/** A house under control, as its nodes and its listeners see it. */
export interface ControlledHouse {
  readonly id: string;
  readonly holdingId: string;
  readonly record: HouseRecord;
  readonly last: StepResult | null;
  /** Its step throws: nothing is commanded. */
  readonly isFailed: boolean;
  /** Looks at everything again. */
  step(): void;
  /** Looks again after so long (real time) at the latest: something came in that decides nothing by itself. */
  stepWithin(ms: number): void;
}

export interface HouseDeps extends Base {
  journal: Journal;
  alarms: AlarmKeeper;
  /** Epoch of this worker's lead. */
  epoch: () => number;
  /** A node has seen a later epoch than ours. */
  raiseEpoch: (seen: number) => void;
  /** App time at which this worker began to lead. */
  startedAt: number;
  onState: (house: ControlledHouse, state: HouseState) => void;
  onSwitching: (house: ControlledHouse, channel: number, at: number, to: State, claim: string) => void;
  /** A pack came from a node, by its key; what was made of it is only reckoned where somebody looks. */
  onPack: (house: ControlledHouse, nodeKey: string, told: () => TailRecord[]) => void;
}
