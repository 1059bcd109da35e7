/** The set-up of a house in words: what is there, what is missing, and what each step is for. */
import { nextStep, type SetupFacts, type SetupStep, type SetupStepName } from '@/lib/analysis/setup';
import { capital, counted, countWord } from './counts';
import { between, join } from './join';
import type { Phrase } from './phrase';
import { midSentence } from './rule-names';

export const STEP_TITLES: Record<SetupStepName, string> = {
  house: 'The house',
  node: 'Field nodes',
  point: 'Points',
  source: 'Sources of heat',
  channel: 'Channels',
  loop: 'Loops',
  rule: 'The first rule',
  proving: 'Proving',
  sheet: 'The printed sheet',
};

/** What stands behind a step, for who has never seen one. */
export const STEP_WHY: Record<SetupStepName, string> = {
  house: 'Sunset, the weight of the air and the hours of rules go by its place and zone.',
  node: 'A node is the box that reads the sensors and moves the relays. Registering it gives its token, which is shown once.',
  point:
    'A point is a place where something is measured. The house air or a bench first: without it nothing can be judged, not even frost.',
  source: 'What heat is drawn from. A heap or the ground must rest between draws; a heater need not.',
  channel:
    'A channel is one relay with its load. Wire it with the supply isolated and the isolator locked; it moves nothing until a rule or a hand asks for it.',
  loop: 'The closed air pipe through a heap or the ground. From its two points and the flow the heat is reckoned.',
  rule: 'When a channel runs. It begins as a careful draft, and nothing moves until somebody puts it into force.',
  proving:
    'Each channel is run, seen to move the right load the right way, and seen to fall safe when it is unplugged.',
  sheet:
    'What is wired where, for the door of the panel: print it when all is proved, and again after each change.',
};

const MISSING: Partial<Record<SetupStepName, string>> = {
  node: 'a field node',
  point: 'a point of the house air or a bench',
  source: 'a source of heat',
  channel: 'a channel',
  loop: 'a loop',
  rule: 'a rule in force',
};

/** What the step says of itself: what is there, or what it waits for. */
export function stepSays(one: SetupStep, facts: SetupFacts): string {
  const { nodes, points, sources, channels, loops } = facts;
  if (one.state === 'waits') return `Waits for ${listed(one.for.map((step) => WAITED[step]))}.`;
  switch (one.step) {
    case 'house':
      return 'It is there.';
    case 'node': {
      const silent = nodes.filter((node) => !node.isHeard).map((node) => node.key);
      if (nodes.length === 0) return 'None yet.';
      return silent.length === 0
        ? `${capital(counted(nodes.length, 'node'))}, and each has answered.`
        : `${capital(counted(nodes.length, 'node'))}. ${listed(silent)} has never answered: put the token into it.`;
    }
    case 'point': {
      if (points.length === 0) return 'None yet.';
      const has = one.state === 'done' ? '' : ', none of them the house air or a bench';
      return `${capital(counted(points.length, 'point'))}${has}.`;
    }
    case 'source':
      return sources.length === 0 ? 'None yet.' : `${capital(counted(sources.length, 'source'))}.`;
    case 'channel':
      return channels.length === 0 ? 'None yet.' : `${capital(counted(channels.length, 'channel'))}.`;
    case 'loop':
      if (loops.length === 0 && one.state === 'done') return 'No heap and no ground here, so none is wanted.';
      return loops.length === 0 ? 'None yet.' : `${capital(counted(loops.length, 'loop'))}.`;
    case 'rule':
      return ruleSays(facts);
    case 'proving': {
      const open = channels.filter((channel) => !channel.isProved);
      if (open.length === 0) return `All ${countWord(channels.length)} are proved.`;
      return `${capital(counted(open.length, 'channel'))} not proved yet: ${listed(open.map((channel) => midSentence(channel.label)))}.`;
    }
    case 'sheet':
      return 'It always shows how things stand; what is not recorded is said to be so.';
  }
}

function ruleSays({ rulesInForce, drafts }: SetupFacts): string {
  if (rulesInForce > 0) return `${capital(counted(rulesInForce, 'rule'))} in force.`;
  return drafts === 0 ? 'None yet.' : `${capital(counted(drafts, 'draft'))}, none in force yet.`;
}

const WAITED: Record<SetupStepName, string> = {
  house: 'the house',
  node: 'a field node that has relays or sensors',
  point: 'points',
  source: 'a source',
  channel: 'a channel',
  loop: 'a loop',
  rule: 'a rule',
  proving: 'proving',
  sheet: 'the sheet',
};

function listed(items: readonly string[]): string {
  if (items.length < 2) return items[0] ?? '';
  return `${items.slice(0, -1).join(', ')} and ${items.at(-1) ?? ''}`;
}

/** @example "Four of seven steps are done. Next: channels." */
export function setupSentence(steps: readonly SetupStep[]): Phrase[] {
  const counts = steps.filter((one) => one.step !== 'sheet');
  const done = counts.filter((one) => one.state === 'done').length;
  const putOff = counts.filter((one) => one.state === 'put-off').length;
  const next = nextStep(steps);
  const off = putOff === 0 ? '' : ` ${capital(countWord(putOff))} ${putOff === 1 ? 'is' : 'are'} put off.`;
  if (done === counts.length)
    return join(
      { text: 'This house is set up and proved.', tone: 'strong' },
      ' Print the sheet for its door.',
    );
  const head = `${capital(countWord(done))} of ${countWord(counts.length)} steps ${done === 1 ? 'is' : 'are'} done.`;
  return join(
    { text: head, tone: 'strong' },
    off,
    next === null
      ? ' What is left waits for what was put off.'
      : ` Next: ${midSentence(STEP_TITLES[next.step])}.`,
  );
}

/**
 * What is missing, as the first sentence of Wiring; empty where nothing is, and where there is no node yet, which Wiring
 * says in its own words. What was put off is not missed.
 */
export function missingSentence(steps: readonly SetupStep[]): Phrase[] {
  const missing = steps
    .filter((one) => one.state === 'open' || one.state === 'waits')
    .flatMap((one) => MISSING[one.step] ?? []);
  if (missing.length === 0 || steps.some((one) => one.step === 'node' && one.state !== 'done')) return [];
  return join(
    { text: 'Still missing: ', tone: 'warn' },
    between(
      missing.map((text) => ({ text, tone: 'warn' as const })),
      ', ',
      ' and ',
    ),
    { text: '.', tone: 'warn' },
  );
}
