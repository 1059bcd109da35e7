import 'server-only';
import type { Holding } from '@/db/client';
import { listChannels } from '@/db/queries/channel';
import { resolveBody, type FoundRule } from '@/db/queries/rule';
import type { Finding, RuleBody } from '@/lib/schema/rule';
import { Problem } from './errors';

/**
 * Things to look at in the draft (else in what is in force), or in a body that is still being typed.
 * @throws Refusal at the path of a point that the house does not have
 */
export async function findingsOf(
  holding: Holding,
  rule: FoundRule,
  typed: RuleBody | undefined,
): Promise<Finding[]> {
  if (typed !== undefined) await resolveBody(holding, rule.houseId, typed);
  return [];
}

/** @throws Problem `conflict` for what keeps a draft out of force */
export async function refuseForce(holding: Holding, rule: FoundRule, acceptUnproved: boolean): Promise<void> {
  if (rule.draft === null) throw conflict('This rule has no draft to put into force.');
  const channel = (await listChannels(holding, rule.houseId)).find((one) => one.id === rule.channelId);
  if (channel === undefined) throw conflict('The channel of this rule was taken out of use.');
  if (channel.provedAt === null && !acceptUnproved) {
    throw conflict(
      `${channel.label} is not proved: nobody has seen that this relay moves this load. Prove it, or accept that (acceptUnproved).`,
    );
  }
  const stops = (await findingsOf(holding, rule, undefined)).filter((one) => one.level === 'stop');
  if (stops.length > 0) throw conflict(stops.map((one) => one.text).join(' '));
}

function conflict(detail: string): Problem {
  return new Problem('conflict', { detail });
}
