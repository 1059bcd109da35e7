/** Static checks of a rule before it goes into force. */
import { bandChecks } from './checks/band-checks';
import { sayIn, type CheckContext, type Finding, type RuleToCheck } from './checks/finding';
import { restChecks } from './checks/rest-checks';
import { wiringChecks } from './checks/wiring-checks';
import type { HouseConfig } from './types';

/**
 * What stops a rule, or is to be looked at, as the configuration and what else is known show it. `config.rules` are
 * those in force; the rule's own version among them is left out by its id. Stops come first.
 */
export function check(config: HouseConfig, rule: RuleToCheck, context: CheckContext = {}): Finding[] {
  const channel = config.channels.find((one) => one.key === rule.channel) ?? null;
  const input = { config, rule, channel, context, say: sayIn(context.preferences) };
  const found = [...wiringChecks(input), ...restChecks(input), ...bandChecks(input)];
  return found.sort((a, b) => Number(b.level === 'stop') - Number(a.level === 'stop'));
}
