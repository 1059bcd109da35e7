/** Things to look at in what a rule hangs on: points, channel, contact, interlocks, conditions. */
import { contactLoad } from '@/lib/physics/contact';
import { needsCycle } from '../interlocks';
import type { ConditionNode } from '../rule-body';
import { look, stop, type CheckInput, type Finding } from './finding';
import { canNeverHold } from './never-holds';

export function wiringChecks(input: CheckInput): Finding[] {
  return [
    ...missingNames(input),
    ...rings(input),
    ...conditionChecks(input),
    ...contactOverloaded(input),
    ...proofAndFallback(input),
    ...lastResortOverBand(input),
  ];
}

function missingNames({ config, rule, channel }: CheckInput): Finding[] {
  const known = new Set(config.points.map((one) => one.key));
  const { point, standIns, rest, only } = rule.body;
  const named: [string, string][] = [
    ['point', point],
    ...standIns.map((one, index): [string, string] => [`standIns.${index}.point`, one.point]),
  ];
  if (rest?.until !== undefined) named.push(['rest.until.point', rest.until.point]);
  if (rest?.leastGain !== undefined) {
    named.push(
      ['rest.leastGain.intake', rest.leastGain.intake],
      ['rest.leastGain.return', rest.leastGain.return],
    );
  }
  const found = named
    .filter(([, key]) => !known.has(key))
    .map(([path, key]) =>
      stop('unknown-point', [path], `There is no point “${key}” in this house. Choose another.`),
    );
  for (const { fact, path } of only === undefined ? [] : factsOf(only, 'only'))
    if (!fact.startsWith('time.') && !known.has(fact))
      found.push(
        stop('unknown-point', [`${path}.fact`], `There is no point “${fact}” in this house. Choose another.`),
      );
  if (channel === null)
    found.push(
      stop(
        'unknown-channel',
        ['channel'],
        `There is no channel “${rule.channel}” in this house. Choose another.`,
      ),
    );
  return found;
}

function factsOf(node: ConditionNode, path: string): { fact: string; path: string }[] {
  if ('all' in node) return node.all.flatMap((one, index) => factsOf(one, `${path}.all.${index}`));
  if ('any' in node) return node.any.flatMap((one, index) => factsOf(one, `${path}.any.${index}`));
  if ('not' in node) return factsOf(node.not, `${path}.not`);
  return [{ fact: node.fact, path }];
}

function rings({ config }: CheckInput): Finding[] {
  const ring = needsCycle(config.interlocks.filter((one) => one.kind === 'needs'));
  const found =
    ring.length === 0
      ? []
      : [
          stop(
            'cycle',
            [],
            `These channels need each other in a ring, so none could start: ${ring.join(', ')}. Take out one interlock in Wiring.`,
          ),
        ];
  const derived = config.points.flatMap((one) =>
    (one.derived?.points ?? []).map((other) => ({ channel: one.key, other })),
  );
  const points = needsCycle(derived);
  if (points.length > 0)
    found.push(
      stop(
        'cycle',
        [],
        `These points are derived from each other in a ring: ${points.join(', ')}. Take one out in Wiring.`,
      ),
    );
  return found;
}

function conditionChecks({ config, rule, context }: CheckInput): Finding[] {
  const { only } = rule.body;
  if (only === undefined) return [];
  const found: Finding[] = [];
  const plain = config.points.filter(({ key }) => context.corrected?.includes(key) !== true);
  const ranges = Object.fromEntries(plain.map(({ key, min, max }) => [key, { min, max }]));
  if (canNeverHold(only, ranges))
    found.push(
      stop(
        'never-holds',
        ['only'],
        'These conditions can never hold together, so the channel would never run. Loosen one of them.',
      ),
    );
  const onGain = factsOf(only, 'only').find(({ fact }) => isGain(config, fact));
  if (onGain !== undefined)
    found.push(
      look(
        'condition-on-gain',
        [`${onGain.path}.fact`],
        `“${nameOf(config, onGain.fact)}” tells what the loop brings while the fan runs; in still air it brings nothing, so the fan could never start. Use “stop if it brings less than” instead.`,
      ),
    );
  return found;
}

/** A loop's return, what is derived from both its ends, or from such a point again. */
function isGain(config: CheckInput['config'], key: string, above: readonly string[] = []): boolean {
  const point = config.points.find((one) => one.key === key);
  if (point === undefined || above.includes(key)) return false;
  if (point.role === 'loop-return' || point.derived?.of === 'loop-heat') return true;
  const of = point.derived?.points ?? [];
  const isOfLoop = config.loops.some(
    (one) => one.return !== null && one.intake !== null && of.includes(one.return) && of.includes(one.intake),
  );
  return isOfLoop || of.some((other) => isGain(config, other, [...above, key]));
}

const nameOf = (config: CheckInput['config'], key: string): string =>
  config.points.find((one) => one.key === key)?.name ?? key;

function contactOverloaded({ channel, context }: CheckInput): Finding[] {
  const facts = channel === null ? undefined : context.channels?.[channel.key];
  if (channel === null || facts === undefined) return [];
  const { volts, supply, contactAmps } = facts;
  const carried = contactLoad({ kind: channel.loadKind, watts: channel.loadW, volts, supply, contactAmps });
  if (carried === null || !carried.isOver) return [];
  const a = (amps: number) => `${Math.round(amps * 100) / 100} A`;
  const why = [
    ...(carried.kindShare === 1 ? [] : ['starting draws many times the running current']),
    ...(carried.dcShare === 1 ? [] : ['direct current keeps its arc']),
  ];
  const of = why.length === 0 ? '' : ` of its ${carried.rating} A, since ${why.join(' and ')}`;
  const text = `The load draws ${a(carried.amps)}; its contact bears ${a(carried.bears)}${of}. Use a contactor, or another relay.`;
  return [look('contact-overloaded', ['channel'], text)];
}

function proofAndFallback({ config, rule, channel, context }: CheckInput): Finding[] {
  const found: Finding[] = [];
  if (context.channels?.[rule.channel]?.proved === false)
    found.push(
      look(
        'unproved',
        ['channel'],
        'Nobody has proved this channel: see the load run before a rule relies on it.',
      ),
    );
  if (context.channels === undefined || config.house.frostLimit === null || channel === null) return found;
  const { lastResort } = context;
  const hasFallback = Object.values(context.channels).some((one) => one.hasFallback === true);
  if (!hasFallback && lastResort?.isProved !== true)
    found.push(
      look(
        'no-last-resort',
        [],
        lastResort === null || lastResort === undefined
          ? 'This house has a frost limit, but nothing keeps it when the network or this program fails: set a fallback on a channel, or wire a thermostat of last resort under the lowest band and prove it.'
          : 'Nobody has seen the thermostat of last resort work: try it, and write the day down in Wiring.',
      ),
    );
  return found;
}

/** It would run before the rule does, and hide that the rule does not. */
function lastResortOverBand({ rule, context, say }: CheckInput): Finding[] {
  const { lastResort } = context;
  if (lastResort === null || lastResort === undefined || rule.body.purpose !== 'warm') return [];
  return rule.body.band.flatMap(({ low }, index) =>
    lastResort.below < low
      ? []
      : [
          look(
            'last-resort-over-band',
            [`band.${index}.low`],
            `The thermostat of last resort is set to ${say.temperature(lastResort.below)}, not under “on below” (${say.temperature(low)}): it would run first. Set it lower, or raise “on below”.`,
          ),
        ],
  );
}
