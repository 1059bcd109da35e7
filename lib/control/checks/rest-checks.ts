/** Things to look at in a rule's rest. */
import { lasting, look, stop, type CheckInput, type Finding } from './finding';

const UNWISE_S = 300;

export function restChecks(input: CheckInput): Finding[] {
  const { rule, channel, context, say } = input;
  const { rest } = rule.body;
  if (rest === undefined || channel === null) return [];
  const found: Finding[] = [];
  const { longestDraw, least, until, leastGain } = rest;
  if (longestDraw < channel.minOnS)
    found.push(
      stop(
        'draw-under-least-on',
        ['rest.longestDraw'],
        `The longest draw (${lasting(longestDraw)}) is shorter than the channel's least time on (${lasting(channel.minOnS)}), so it could never start. Lengthen the draw, or shorten the least time on in Wiring.`,
      ),
    );
  if (leastGain !== undefined && longestDraw < leastGain.after)
    found.push(
      look(
        'draw-under-gain-wait',
        ['rest.longestDraw', 'rest.leastGain.after'],
        `The draw ends after ${lasting(longestDraw)}, before “stop if it brings less than” looks (after ${lasting(leastGain.after)}): it would never speak. Lengthen the draw, or let it look sooner.`,
      ),
    );
  const greatest = until === undefined ? undefined : context.greatest?.[until.point];
  if (until !== undefined && greatest !== undefined && until.level > greatest)
    found.push(
      look(
        'recovery-out-of-reach',
        ['rest.until.level'],
        `${say.temperature(until.level)} has not been reached in the last 14 nights (${say.temperature(greatest)} at most), so every rest would run to its longest time. Lower it.`,
      ),
    );
  if (longestDraw < UNWISE_S)
    found.push(
      look(
        'short-draw',
        ['rest.longestDraw'],
        `A draw of ${lasting(longestDraw)} hardly warms the pipe: half an hour and more is usual.`,
      ),
    );
  if (least < UNWISE_S)
    found.push(
      look(
        'short-rest',
        ['rest.least'],
        `A rest of ${lasting(least)} gives the heap beside the pipe no time: it takes some half an hour.`,
      ),
    );
  if (channel.source === null)
    found.push(
      look(
        'rest-without-source',
        ['rest'],
        `This channel names no source, so its rest is its own: another fan on the same heap would not share it. Name the source in Wiring.`,
      ),
    );
  return [...found, ...neverWorth(input)];
}

/** A least on time that the credit is never worth while the source's other fans run. */
function neverWorth({ config, rule, channel }: CheckInput): Finding[] {
  const { rest } = rule.body;
  if (rest === undefined || channel === null || channel.source === null || channel.minOnS === 0) return [];
  const shortest = new Map<string, number>();
  for (const other of config.rules) {
    const wired = config.channels.find((one) => one.key === other.channel);
    if (other.id === rule.id || wired?.source !== channel.source || other.channel === channel.key) continue;
    const draw = other.body.rest?.longestDraw;
    if (draw !== undefined)
      shortest.set(other.channel, Math.min(draw, shortest.get(other.channel) ?? Infinity));
  }
  const rate = [...shortest.values()].reduce((sum, draw) => sum + 1 / draw, 1 / rest.longestDraw);
  if (shortest.size === 0 || 1 / rate >= channel.minOnS) return [];
  return [
    look(
      'least-on-never-worth',
      ['rest.longestDraw'],
      `With the source's other fans running a full credit lasts ${lasting(Math.floor(1 / rate))}, less than this channel's least time on (${lasting(channel.minOnS)}): it could not start beside them. Lengthen the draws, or shorten the least time on.`,
    ),
  ];
}
