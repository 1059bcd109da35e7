/** A way to a node that the worker goes to itself. */
import type { HouseRecord, NodeWiring } from '@/db/queries/plan';
import type { Base } from '../base';
import type { House } from '../control/house';
import type { Gate } from './gate';
import type { Ingest } from './ingest';

export interface BusDeps extends Base {
  ingest: Ingest;
  gate: Gate;
  /** Of this worker's lead. */
  epoch: () => number;
  /** Whether nobody else can lead by now: the lead was renewed in time. */
  isSure: () => boolean;
  /** Whether it may write to what keeps no command numbers: it is sure, or has just found the database away. */
  mayDrive: () => boolean;
}

export interface Bus {
  readonly isUp: boolean;
  /** @param isEnd this worker ends, and nobody is known to follow it at once */
  stop(isEnd: boolean): Promise<void>;
}

export interface BusNode {
  house: House;
  nodeId: string;
}

/** As wired now; a change of plan may have changed it. */
export function wiringOf({
  house,
  nodeId,
}: {
  house: { record: HouseRecord };
  nodeId: string;
}): NodeWiring | undefined {
  return house.record.nodes.find((one) => one.id === nodeId);
}
