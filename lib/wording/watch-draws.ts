/** What the loads do, inside the sentence of Watch. */
import { temperature } from '@/lib/units/format';
import { becauseInstant } from './instants';
import { join, sentences } from './join';
import type { Phrase, Tone } from './phrase';
import { pointTone } from './rule-names';
import { begin, channelName, pointName, timeWords, type Scene } from './scene';
import type { HouseStanding, StandingChannel } from './watch-standing';

const coloured = (text: string, tone: Tone): Phrase => ({ text, tone });

export function drawSentence(standing: HouseStanding, scene: Scene): Phrase[] {
  return sentences(
    ...standing.draws.map(({ channel: key, base }) => {
      const channel = standing.channels.find((one) => one.key === key);
      if (channel === undefined) return [];
      return join(
        begin(channelName(key, scene)),
        ' ',
        doing(channel, scene),
        baseWords(standing, base, scene),
        '.',
      );
    }),
  );
}

/** "rests until 06:06", "runs for the band", "is off" … */
function doing(channel: StandingChannel, scene: Scene): Phrase[] {
  const reason = typeof channel.because === 'object' && channel.because !== null ? channel.because : {};
  const field = (name: string): unknown => Object.getOwnPropertyDescriptor(reason, name)?.value;
  const till = (name: string) => timeWords(becauseInstant(field(name)), scene);
  const runs = channel.state === 'on';
  if (channel.mode === 'locked') return [coloured('is locked out', 'strong')];
  switch (channel.claim) {
    case 'hand': {
      const until = till('until');
      return [
        coloured(runs ? 'runs by hand' : 'is off by hand', 'strong'),
        until === null ? '' : ` until ${until}`,
      ];
    }
    case 'rest': {
      const least = till('restUntil') ?? till('until');
      const waits = field('recovery') !== undefined;
      const until = least === null ? 'rests' : `rests until ${least}${waits ? ' at least' : ''}`;
      return [coloured(until, 'strong')];
    }
    case 'frost':
      return [coloured(runs ? 'runs against frost' : 'is held still by frost', 'strong')];
    case 'fail-safe':
      return [coloured(runs ? 'runs: its sensor is missing' : 'is off: its sensor is missing', 'warn')];
    case 'source-guard':
      return [coloured('is off to spare the heap', 'warn')];
    default:
      return runs ? [coloured('runs', 'strong')] : ['is off'];
  }
}

function baseWords(standing: HouseStanding, base: string | null, scene: Scene): Phrase[] {
  const point = standing.points.find((one) => one.key === base);
  if (point === undefined || point.value === null || point.quality === 'bad') return [];
  return [
    `; ${pointName(point.key, scene)} is at `,
    coloured(temperature(point.value, scene.preferences), toneOf(point.key, scene)),
  ];
}

function toneOf(key: string, scene: Scene): Tone {
  return pointTone(key, { points: scene.points, channel: { label: '', loadKind: '' } });
}

/** What else runs, so that nothing is on without being said. */
export function othersSentence(standing: HouseStanding, scene: Scene): Phrase[] {
  const spoken = new Set(standing.draws.map((draw) => draw.channel));
  const on = standing.channels.filter((one) => one.state === 'on' && !spoken.has(one.key));
  if (on.length === 0) return [];
  const names = on.map((one) => channelName(one.key, scene));
  const list = names.length === 1 ? names[0] : `${names.slice(0, -1).join(', ')} and ${names.at(-1) ?? ''}`;
  return [`${begin(list ?? '')} ${on.length === 1 ? 'is' : 'are'} on${spoken.size === 0 ? '' : ' too'}.`];
}
