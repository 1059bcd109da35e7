/**
 * A rule as the sentence a grower would say. Made from its body alone, so that list, editor, trial and mail all say the
 * same of the same rule.
 */
import type { RuleBody } from '@/lib/control/rule-body';
import { difference, temperature } from '@/lib/units/format';
import type { Preferences } from '@/lib/units/preferences';
import { join, sentences } from './join';
import type { Phrase } from './phrase';
import { conditionWords } from './rule-conditions';
import { midSentence, pointTone, pointWords, type RuleNames } from './rule-names';
import { dayTimeWords, whenWords } from './rule-when';
import { amount, exactly, level } from './settings';

interface Verbs {
  begin: (label: Phrase) => Phrase[];
  end: string;
}

/** A fan is run, a vent opened, a mat switched on. */
function verbs(loadKind: string): Verbs {
  switch (loadKind) {
    case 'motor':
      return { begin: (label) => join('Run the ', label), end: 'stop it' };
    case 'vent':
    case 'valve':
      return { begin: (label) => join('Open the ', label), end: 'shut it' };
    default:
      return { begin: (label) => join('Switch the ', label, ' on'), end: 'switch it off' };
  }
}

function bandSentence(body: RuleBody, names: RuleNames, preferences: Preferences): Phrase[] {
  const tone = pointTone(body.point, names);
  const at = (celsius: number): Phrase => ({ text: temperature(celsius, preferences), tone });
  const warm = body.purpose === 'warm';
  const verb = verbs(names.channel.loadKind);
  const begin = verb.begin({ text: midSentence(names.channel.label), tone: 'strong' });
  const point: Phrase = { text: pointWords(body.point, names), tone: 'strong' };
  const [first, ...others] = body.band;
  if (!first) return join(begin, ' by ', point, '.');
  if (others.length === 0) {
    return join(
      begin,
      ' when ',
      point,
      warm ? ' falls below ' : ' rises above ',
      at(warm ? first.low : first.high),
      `, ${verb.end} ${warm ? 'above' : 'below'} `,
      at(warm ? first.high : first.low),
      '.',
    );
  }
  const periods = body.band.flatMap((period, index) => [
    index === 0 ? '' : '; ',
    `from ${dayTimeWords(period.from, preferences)} ${warm ? 'below' : 'above'} `,
    at(warm ? period.low : period.high),
    `, ${verb.end} ${warm ? 'above' : 'below'} `,
    at(warm ? period.high : period.low),
  ]);
  return join(begin, ' by ', point, ': ', ...periods, '.');
}

function standInSentence(body: RuleBody, names: RuleNames, preferences: Preferences): Phrase[] {
  if (body.standIns.length === 0) return [];
  const stands = body.standIns.map((standIn) => {
    const by = pointWords(standIn.point, names);
    if (standIn.offset === 0) return by;
    const much = amount(Math.abs(standIn.offset), preferences);
    return `${by} ${standIn.offset < 0 ? 'less' : 'plus'} ${much}`;
  });
  return join(`If that sensor fails, go by ${stands.join(', then by ')}.`);
}

/** "After 25 min of draw rest at least 30 min, then until the heap beside the pipe is back to 43 °C, 60 min at most." */
export function restSentence(
  rest: NonNullable<RuleBody['rest']>,
  names: RuleNames,
  preferences: Preferences,
): Phrase[] {
  const ember = (text: string): Phrase => ({ text, tone: 'ember' });
  const wait = rest.until
    ? join(
        `, then until ${pointWords(rest.until.point, names)} is back to `,
        {
          text: level(rest.until.level, preferences),
          tone: pointTone(rest.until.point, names),
        },
        rest.most === undefined ? '' : `, ${exactly(rest.most)} at most`,
      )
    : [];
  const gain = rest.leastGain
    ? join(
        ' Stop a draw that brings less than ',
        ember(difference(rest.leastGain.kelvin, preferences)),
        ` after ${exactly(rest.leastGain.after)}.`,
      )
    : [];
  return join(
    'After ',
    ember(exactly(rest.longestDraw)),
    ' of draw rest at least ',
    ember(exactly(rest.least)),
    wait,
    '.',
    gain,
    rest.frostMayBreak ? ' Frost may break the rest.' : ' Not even frost may break the rest.',
  );
}

/**
 * The whole rule in words; °C in, the reader's unit out.
 * @example "Run the gate-heap fan when the bench falls below 4.0 °C, stop it above 7.0 °C. After 25 min of draw rest …"
 */
export function ruleSentence(body: RuleBody, names: RuleNames, preferences: Preferences): Phrase[] {
  const only = body.only ? join('Only while ', conditionWords(body.only, names, preferences), '.') : [];
  return sentences(
    bandSentence(body, names, preferences),
    standInSentence(body, names, preferences),
    body.rest ? restSentence(body.rest, names, preferences) : [],
    only,
    join(whenWords(body, preferences)),
  );
}

/** The sentence of the list: what starts and stops it, and its rest in short. */
export function ruleHeadline(body: RuleBody, names: RuleNames, preferences: Preferences): Phrase[] {
  return bandSentence(body, names, preferences);
}

/** "4.0 to 7.5 °C"; of several periods the widest span. */
export function bandWords(body: RuleBody, preferences: Preferences): string {
  const low = Math.min(...body.band.map((period) => period.low));
  const high = Math.max(...body.band.map((period) => period.high));
  const from = temperature(low, preferences).replace(/\u00a0.*$/, '');
  return `${from} to ${temperature(high, preferences)}`;
}
