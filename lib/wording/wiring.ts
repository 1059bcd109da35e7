/** How the wiring of a house stands, for the head of its page: what is missing, what is proved, which node answered. */
import { age, duration } from '@/lib/units/time';
import { capital, counted, countWord } from './counts';
import { between, join, sentences } from './join';
import type { Phrase } from './phrase';
import { midSentence } from './rule-names';

export interface WiringStanding {
  nodes: {
    key: string;
    lastHeardAt: number | null;
    isRevoked: boolean;
    /** Labels of channels that it keeps by their fallback. */
    keeps?: string[];
    /** It is a board that keeps no lease; null: nor a watchdog. */
    board?: { watchdogS: number | null };
  }[];
  points: { name: string; isGood: boolean }[];
  channels: { number: number; label: string; isProved: boolean; isLockedOut: boolean }[];
}

/** Seconds of app time after which a relay that hears nothing has dropped its coil (field.md). */
export const LEASE_S = 30;

/** @example "Three of four channels are proved. Channel 4, the ridge vent, has been wired but never tested. Field node LH-1 answered 3 s ago; …" */
export function wiringSentence(standing: WiringStanding, now: number): Phrase[] {
  if (standing.nodes.length === 0) {
    return join(
      { text: 'No field node yet.', tone: 'strong' },
      ' It carries the sensors and the relays of this house: register it first, then its points and channels.',
    );
  }
  return sentences(
    lockedSentence(standing),
    provedSentence(standing),
    ...standing.nodes.map((node) => nodeSentence(node, now)),
  );
}

function lockedSentence({ channels }: WiringStanding): Phrase[] {
  const locked = channels.filter((channel) => channel.isLockedOut);
  if (locked.length === 0) return [];
  return join(
    { text: `The `, tone: 'warn' },
    between(
      locked.map((channel) => ({ text: midSentence(channel.label), tone: 'warn' })),
      ', ',
      ' and ',
    ),
    { text: locked.length === 1 ? ' is locked out.' : ' are locked out.', tone: 'warn' },
  );
}

function provedSentence({ channels, points }: WiringStanding): Phrase[] {
  if (channels.length === 0) {
    return join(
      { text: 'No channel yet,', tone: 'strong' },
      points.length === 0
        ? ' and no point: nothing is measured and nothing is switched.'
        : ` but ${counted(points.length, 'point')}: this house is measured, and nothing is switched.`,
    );
  }
  const open = channels.filter((channel) => !channel.isProved);
  const proved = channels.length - open.length;
  if (open.length === 0) {
    const all =
      channels.length === 1
        ? 'The one channel is proved.'
        : `All ${countWord(channels.length)} channels are proved.`;
    return join({ text: all, tone: 'strong' });
  }
  const few = open
    .slice(0, 3)
    .map((channel) => `channel ${channel.number}, the ${midSentence(channel.label)},`);
  const told =
    open.length > 3
      ? `${capital(counted(open.length, 'channel has', 'channels have'))} been wired but never tested.`
      : `${capital(few.join(' and '))} ${open.length === 1 ? 'has' : 'have'} been wired but never tested.`;
  return join(
    {
      text: `${proved === 0 ? 'None' : capital(countWord(proved))} of ${counted(channels.length, 'channel')} ${proved === 1 ? 'is' : 'are'} proved.`,
      tone: 'strong',
    },
    ` ${told}`,
  );
}

/** A board keeps no lease of ours: what becomes of its relays is its watchdog's business, or nobody's. */
function boardSentence(
  { key, lastHeardAt, isRevoked }: WiringStanding['nodes'][number],
  watchdogS: number | null,
  now: number,
): Phrase[] {
  const keeps = watchdogS === null;
  const left = keeps
    ? { text: 'having no watchdog, its relays may still be as they last were.', tone: 'warn' as const }
    : 'its watchdog has dropped its relays.';
  if (isRevoked) return join('Board ', key, ' is revoked: it is neither read nor switched.');
  if (lastHeardAt === null)
    return join('Board ', key, { text: ' has never answered:', tone: 'warn' }, ' look at how it is reached.');
  const silentS = (now - lastHeardAt) / 1000;
  if (silentS > Math.max(LEASE_S, watchdogS ?? 0))
    return join(
      'Board ',
      key,
      { text: ` has been silent for ${duration(silentS)};`, tone: 'warn' },
      ' ',
      left,
    );
  const answered = `Board ${key} answered ${age(now - lastHeardAt)}; `;
  return keeps
    ? join(answered, {
        text: 'having no watchdog, its relays stay as they are when the network fails.',
        tone: 'warn',
      })
    : join(answered, `its watchdog drops its relays ${watchdogS}\u00a0s after it was last spoken to.`);
}

function nodeSentence(node: WiringStanding['nodes'][number], now: number): Phrase[] {
  const key = node.key;
  if (node.board !== undefined) return boardSentence(node, node.board.watchdogS, now);
  if (node.isRevoked)
    return join(
      'Field node ',
      key,
      ' is revoked: it may not speak, and its relays are in their safe states.',
    );
  if (node.lastHeardAt === null) {
    return join(
      'Field node ',
      key,
      { text: ' has never answered:', tone: 'warn' },
      ' put its token into it.',
    );
  }
  const silentS = (now - node.lastHeardAt) / 1000;
  return silentS > LEASE_S
    ? join(
        'Field node ',
        key,
        { text: ` has been silent for ${duration(silentS)};`, tone: 'warn' },
        ' its relays are in their safe states.',
      )
    : join(
        'Field node ',
        key,
        ` answered ${age(now - node.lastHeardAt)}; its relays fall back to their safe states if it hears nothing for ${LEASE_S}\u00a0s${keptWords(node.keeps ?? [])}.`,
      );
}

/** @example keptWords(['Gate-heap fan']) === ', and it then runs the gate-heap fan by its fallback' */
function keptWords(labels: readonly string[]): string {
  if (labels.length === 0) return '';
  const loads = labels.map((label) => `the ${midSentence(label)}`);
  const last = loads.pop() ?? '';
  const all = loads.length === 0 ? last : `${loads.join(', ')} and ${last}`;
  return `, and it then runs ${all} by ${labels.length === 1 ? 'its fallback' : 'their fallbacks'}`;
}
