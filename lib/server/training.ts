/**
 * Faults for training, through the door that the simulated yard keeps on loopback. A house can be practised on only where
 * its node is the yard's own: by the hash of its token, since a real node may bear the same key.
 */
import 'server-only';
import { z } from 'zod';
import type { Holding } from '@/db/client';
import { yardNodes, type YardNode } from '@/db/queries/training';
import type { House } from '@/lib/schema/yard-view';
import { FAULT_KINDS, type Training, type TrainingOrder } from '@/lib/schema/training';
import { appNow } from './app-clock';
import { env } from './env';
import { Problem } from './errors';

const ANSWER_WITHIN_MS = 2000;

const TrainedNodes = z.object({
  nodes: z.array(
    z.object({
      tokenHash: z.string(),
      points: z.array(z.string()),
      faults: z.array(
        z.object({
          fault: z.enum(FAULT_KINDS),
          point: z.string().nullable(),
          other: z.string().nullable(),
          relay: z.number().nullable(),
          leftS: z.number(),
        }),
      ),
    }),
  ),
});
type Trained = z.infer<typeof TrainedNodes>['nodes'][number];

interface Pair {
  node: YardNode;
  trained: Trained;
}

const NOTHING: Training = { available: false, points: [], channels: [], faults: [] };

export async function readTraining(holding: Holding, house: House): Promise<Training> {
  const pair = await yardPair(holding, house);
  return pair === null ? NOTHING : shown(pair, await appNow());
}

/** @throws Problem conflict where no node of the yard drives this house */
export async function orderTraining(holding: Holding, house: House, order: TrainingOrder): Promise<Training> {
  const pair = await yardPair(holding, house);
  if (pair === null) {
    throw new Problem('conflict', {
      detail:
        'No node of the simulated yard drives this house, so there is nothing to practise on. Faults for training are never put on a real node.',
    });
  }
  const { node, trained } = pair;
  const channel = node.channels.find((one) => one.number === order.channel);
  if (order.channel !== undefined && channel === undefined) {
    throw new Problem('not-valid', {
      errors: [{ path: 'channel', message: 'No channel of this node has that number.' }],
    });
  }
  const { fault, on, point = null, other = null, seconds } = order;
  const answer = await ask({
    tokenHash: trained.tokenHash,
    fault,
    on,
    point,
    other,
    relay: channel?.relay ?? null,
    seconds,
  });
  if (answer === null)
    throw new Problem('conflict', { detail: 'The simulated yard does not answer just now. Try again.' });
  if ('why' in answer)
    throw new Problem('not-valid', { errors: [{ path: 'point', message: `${answer.why}.` }] });
  const after = answer.nodes.find(({ tokenHash }) => tokenHash === trained.tokenHash);
  return shown({ node, trained: after ?? trained }, await appNow());
}

async function yardPair(holding: Holding, house: House): Promise<Pair | null> {
  if (env().YARD === 'off' || env().TRAINING_PORT === undefined) return null;
  const answer = await ask();
  if (answer === null || 'why' in answer) return null;
  const nodes = await yardNodes(holding, house.id);
  const pairs = nodes.flatMap((node) => {
    const trained = answer.nodes.find(({ tokenHash }) => node.tokenHashes.includes(tokenHash));
    return trained === undefined ? [] : [{ node, trained }];
  });
  return pairs[0] ?? null;
}

function shown({ node, trained }: Pair, now: Date): Training {
  return {
    available: true,
    points: node.points.filter((key) => trained.points.includes(key)),
    channels: node.channels.map(({ number }) => number),
    faults: trained.faults.map(({ fault, point, other, relay, leftS }) => ({
      ...{ fault, point, other },
      channel: node.channels.find((one) => one.relay === relay)?.number ?? null,
      until: new Date(now.getTime() + leftS * 1000).toISOString(),
    })),
  };
}

/** @returns null where the yard does not answer */
async function ask(order?: object): Promise<z.infer<typeof TrainedNodes> | { why: string } | null> {
  try {
    const response = await fetch(`http://127.0.0.1:${env().TRAINING_PORT ?? 0}/faults`, {
      signal: AbortSignal.timeout(ANSWER_WITHIN_MS),
      ...(order === undefined
        ? {}
        : { method: 'POST', headers: { 'content-type': 'application/json' }, body: JSON.stringify(order) }),
    });
    const body: unknown = await response.json();
    if (response.status === 422) return z.object({ why: z.string() }).parse(body);
    return response.ok ? TrainedNodes.parse(body) : null;
  } catch {
    return null;
  }
}
