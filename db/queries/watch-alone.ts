/** What the field boxes of a house did by themselves in a night. */
import type { Holding } from '@/db/client';
import { aloneTimes, type Alone } from '@/lib/analysis/alone';
import { listAlone, listAloneSwitchings } from './node-log';
import type { HouseRecord } from './plan';

/** A run that began before the night goes into it. */
const LEAD_MS = 86_400_000;

export async function readAlone(
  holding: Holding,
  record: HouseRecord,
  from: number,
  now: number,
): Promise<Alone[]> {
  const nodes = new Map(record.nodes.map((node) => [node.id, node.key]));
  const told = (await listAlone(holding, record.id, from, now)).flatMap(({ nodeId, ...time }) => {
    const node = nodes.get(nodeId);
    return node === undefined ? [] : [{ ...time, node }];
  });
  const switchings = await listAloneSwitchings(holding, record.id, from - LEAD_MS, now);
  const loads = record.channels.map(({ id, label, nodeId }) => ({
    ...{ label, node: nodes.get(nodeId) ?? '' },
    switchings: switchings.filter((one) => one.channelId === id),
  }));
  return aloneTimes(told, loads, from, now);
}
