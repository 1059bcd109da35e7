/**
 * A rule as the sentence a grower would say. Made from its body alone, so that list, editor, trial and mail all say the
 * same of the same rule.
 */
import type { RuleBody } from '@/lib/control/types';
import { difference, duration, temperature, type Reader } from '@/lib/units/format';
import { conditionWords } from './rule-conditions';
import { midSentence, pointTone, pointWords, type RuleNames } from './rule-names';
import { dayTimeWords, whenWords } from './rule-when';
import { sentence, type Part, type Sentence } from './sentence';

interface Verbs {
  begin: (label: Part) => Sentence;
  end: string;
}

/** A fan is run, a vent opened, a mat switched on. */
function verbs(loadKind: string): Verbs {
  switch (loadKind) {
    case 'motor':
      return { begin: (label) => sentence('Run the ', label), end: 'stop it' };
    case 'vent':
    case 'valve':
      return { begin: (label) => sentence('Open the ', label), end: 'shut it' };
    default:
      return { begin: (label) => sentence('Switch the ', label, ' on'), end: 'switch it off' };
  }
}

function bandSentence(body: RuleBody, names: RuleNames, reader: Reader): Sentence {
  const tone = pointTone(body.point, names);
  const at = (celsius: number): Part => ({ text: temperature(celsius, reader), tone, strong: true });
  const warm = body.purpose === 'warm';
  const verb = verbs(names.channel.loadKind);
  const begin = verb.begin({ text: midSentence(names.channel.label), strong: true });
  const point: Part = { text: pointWords(body.point, names), strong: true };
  const [first, ...others] = body.band;
  if (!first) return sentence(begin, ' by ', point, '.');
  if (others.length === 0) {
    return sentence(
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
    `from ${dayTimeWords(period.from, reader)} ${warm ? 'below' : 'above'} `,
    at(warm ? period.low : period.high),
    `, ${verb.end} ${warm ? 'above' : 'below'} `,
    at(warm ? period.high : period.low),
  ]);
  return sentence(begin, ' by ', point, ': ', ...periods, '.');
}

function standInSentence(body: RuleBody, names: RuleNames, reader: Reader): Sentence {
  if (body.standIns.length === 0) return [];
  const stands = body.standIns.map((standIn) => {
    const by = pointWords(standIn.point, names);
    if (standIn.offset === 0) return by;
    const much = difference(Math.abs(standIn.offset), reader, 0, 1);
    return `${by} ${standIn.offset < 0 ? 'less' : 'plus'} ${much}`;
  });
  return sentence(`If that sensor fails, go by ${stands.join(', then by ')}.`);
}

/** "After 25 min of draw rest at least 30 min, then until the heap beside the pipe is back to 43 °C, 60 min at most." */
export function restSentence(
  rest: NonNullable<RuleBody['rest']>,
  names: RuleNames,
  reader: Reader,
): Sentence {
  const ember = (text: string): Part => ({ text, tone: 'ember', strong: true });
  const wait = rest.until
    ? sentence(
        `, then until ${pointWords(rest.until.point, names)} is back to `,
        {
          text: temperature(rest.until.level, reader, 0, 1),
          tone: pointTone(rest.until.point, names),
          strong: true,
        },
        rest.most === undefined ? '' : `, ${duration(rest.most)} at most`,
      )
    : [];
  const gain = rest.leastGain
    ? sentence(
        ' Stop a draw that brings less than ',
        ember(difference(rest.leastGain.kelvin, reader, 1)),
        ` after ${duration(rest.leastGain.after)}.`,
      )
    : [];
  return sentence(
    'After ',
    ember(duration(rest.longestDraw)),
    ' of draw rest at least ',
    ember(duration(rest.least)),
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
export function ruleSentence(body: RuleBody, names: RuleNames, reader: Reader): Sentence {
  const only = body.only ? sentence('Only while ', conditionWords(body.only, names, reader), '.') : [];
  const sentences = [
    bandSentence(body, names, reader),
    standInSentence(body, names, reader),
    body.rest ? restSentence(body.rest, names, reader) : [],
    only,
    sentence(whenWords(body, reader)),
  ].filter((one) => one.length > 0);
  return sentence(...sentences.flatMap((one, index) => (index === 0 ? [one] : [' ', one])));
}

/** The sentence of the list: what starts and stops it, and its rest in short. */
export function ruleHeadline(body: RuleBody, names: RuleNames, reader: Reader): Sentence {
  return bandSentence(body, names, reader);
}

/** "4.0 to 7.5 °C"; of several periods the widest span. */
export function bandWords(body: RuleBody, reader: Reader): string {
  const low = Math.min(...body.band.map((period) => period.low));
  const high = Math.max(...body.band.map((period) => period.high));
  const from = temperature(low, reader).replace(/\u00a0.*$/, '');
  return `${from} to ${temperature(high, reader)}`;
}
