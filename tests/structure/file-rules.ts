// Rules about files as such: where they lie, what they are called, how long they are, what they must not give away.

const KNOWN_PLACES = [
  /^app\//,
  /^components\/(ui|chart|shell|door|watch|rules|wiring|proving|setup|sheet|heap|duty|money|reports|files|alarms|sizing|people)\//,
  /^db\/((schema|queries|migrations|seed)\/|client\.ts$|[a-z-]+\.ts$)/,
  /^lib\/(units|physics|control|analysis|wording|field|live|schema|server)\//,
  /^worker\/((control|field|hub|alarms|jobs|spool|door|yard)\/|[a-z-]+\.ts$)/,
  /^(tests|scripts|public|deploy|docs|examples)\//,
  /^[^/]+$/, // settings and papers at the root
  /^\.(ci|github)\//,
];

/** Source in a folder that architecture.md's map does not have. */
export const isLost = (file: string): boolean => !KNOWN_PLACES.some((place) => place.test(file));

const SAYS_NOTHING = /^(utils?|helpers?|misc|index)(\.|$)/;

/** A name that says nothing about what is inside; `index` would be a barrel's. */
export const saysNothing = (file: string): boolean =>
  /\.(tsx?|mjs)$/.test(file) && file.split('/').some((part) => SAYS_NOTHING.test(part));

const BUDGETS: [kind: string, pattern: RegExp, lines: number][] = [
  ['page', /^app\/.*\/?page\.tsx$/, 40],
  ['route', /^app\/.*\/route\.ts$/, 60],
  ['component', /^components\/.*\.tsx$/, 120],
  ['core', /^lib\/(units|physics|control|analysis|wording)\/.*\.ts$/, 200],
  ['test', /^tests\/.*\.test\.tsx?$/, 250],
];

export interface Length {
  file: string;
  kind: string;
  lines: number;
  budget: number;
}

/** The length of a file against the budget of its kind, or null where its kind has none. */
export function lengthOf(file: string, text: string): Length | null {
  const budget = BUDGETS.find(([, pattern]) => pattern.test(file));
  if (budget === undefined) return null;
  const [kind, , limit] = budget;
  return { file, kind, lines: text.trimEnd().split('\n').length, budget: limit };
}

export const isOver = ({ lines, budget }: Length): boolean => lines > budget;
export const isTwiceOver = ({ lines, budget }: Length): boolean => lines > 2 * budget;

// written in pieces, so that this file does not hold what it looks for
const GIVEAWAYS: [what: string, pattern: RegExp][] = [
  ['a registry’s host', new RegExp(['registry', '\\.', '[a-z]+', '\\.'].join(''))],
  ['a mirror’s host', new RegExp(['\\b(artifactory|nexus|verdaccio|pypi)', '\\.'].join(''))],
  [
    'a path of one machine',
    new RegExp(['(^|[^a-z.])/', '(work|root|home/[a-z]+|Users/[a-z]+)', '/'].join(''), 'i'),
  ],
];

/** What a file gives away of the machine on which it was written. */
export const giveaways = (text: string): string[] =>
  GIVEAWAYS.filter(([, pattern]) => pattern.test(text)).map(([what]) => what);

const LOOSE_ENDS: [what: string, pattern: RegExp][] = [
  ['a note to do it later', new RegExp(['\\b(TO', 'DO|FIX', 'ME|X', 'XX)\\b'].join(''))],
  ['a test left out', new RegExp(['\\b(it|test|describe)\\.', '(skip|only|todo|fails)\\b'].join(''))],
];

/** What somebody meant to come back to: a thing is done, or it is an issue. */
export const looseEnds = (text: string): string[] =>
  LOOSE_ENDS.filter(([, pattern]) => pattern.test(text)).map(([what]) => what);
