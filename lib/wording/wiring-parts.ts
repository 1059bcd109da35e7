/** Interlocks, loops, lock-outs and nodes in words, and the cautions that stand beside them. */
import { join } from './join';
import type { Phrase } from './phrase';
import { midSentence } from './rule-names';
import { exactly } from './settings';

const label = (text: string): Phrase => ({ text: midSentence(text), tone: 'strong' });

export interface InterlockWords {
  kind: 'never-with' | 'needs';
  channel: string;
  other: string;
  delayS: number;
  frostMayBreak: boolean;
}

/** @example "The ridge vent never runs with the gate-heap fan; after one is off the other waits 5 s. Not even frost breaks it." */
export function interlockSentence(interlock: InterlockWords): Phrase[] {
  const wait = interlock.delayS === 0 ? null : exactly(interlock.delayS);
  const frost = interlock.frostMayBreak ? ' Frost may break it.' : ' Not even frost breaks it.';
  if (interlock.kind === 'never-with') {
    return join(
      'The ',
      label(interlock.channel),
      ' never runs with the ',
      label(interlock.other),
      wait === null ? '.' : `; after one is off the other waits ${wait}.`,
      frost,
    );
  }
  return join(
    'The ',
    label(interlock.channel),
    ' runs only while the ',
    label(interlock.other),
    wait === null ? ' is on.' : ` is on, and has been for ${wait}.`,
    frost,
  );
}

export interface LoopWords {
  channel: string;
  source: string;
  intake: string;
  return: string;
}

/** Intake first: the fan blows into the pipe, so that a leak goes outwards. */
export function loopSentence(loop: LoopWords): Phrase[] {
  return join(
    'The ',
    label(loop.channel),
    ' blows air in at the ',
    { text: midSentence(loop.intake), tone: 'house' },
    ', through the ',
    { text: midSentence(loop.source), tone: 'core' },
    ', and back to the house past the ',
    { text: midSentence(loop.return), tone: 'ember' },
    '.',
  );
}

export const NODE_WORDS: Record<string, string> = {
  socket: 'measures and switches, over a web socket',
  http: 'only measures, over HTTP',
  modbus: 'a board on Modbus TCP',
  mqtt: 'by way of an MQTT broker',
};

/** Where a node's own programme puts its token. */
export function tokenUse(kind: string, origin: string): string[] {
  if (kind === 'mqtt')
    return [
      'The node signs each frame with it; it is never sent.',
      'Its two topics stand beside it under Field nodes;',
      'how a frame is signed is in docs/buses.md.',
    ];
  const socket = origin.replace(/^http/, 'ws');
  return kind === 'http'
    ? [
        `POST ${origin}/field/v1/readings`,
        'Authorization: Bearer TOKEN',
        'Content-Type: application/senml+json',
      ]
    : [`${socket}/field/v1`, 'Authorization: Bearer TOKEN'];
}

/** What a node needs to know to call, as its settings hold it (examples/node). */
export function nodeSettingsText(node: string, token: string, origin: string): string {
  return JSON.stringify({ server: origin.replace(/^http/, 'ws'), node, token });
}

export const MAINS_CAUTION =
  'Mains circuits here need residual-current protection and enclosures for wet places, and belong to a licensed electrician under your local code. This sheet records the work; it does not approve it.';
export const LOCKOUT_CAUTION =
  'A lock-out is not isolation: it only keeps this software from running the load. Before you touch anything, open the isolator, lock it, and test that the circuit is dead.';
export const NC_LOCKOUT_REFUSAL =
  'A relay cannot make this load dead: its contact is normally closed, so the load runs while the coil is off. Use its isolator.';
/** Common practice, no source. */
export const REVERSING_CAUTION =
  'Two relays, never both on: the interlock in Middenward does not replace one in the wiring; end switches of the motor stop it.';
export const LOOP_CAUTION =
  'The loop stays closed. The fan blows into the heap’s pipe and never sucks from it, so that a leak goes outwards; never draw air out of a heap into a house where people work. Where they do, hang a certified carbon monoxide alarm of its own.';
export const LAST_RESORT_CAUTION =
  'Whatever is wired here, fit a thermostat of last resort that works without any software, set under the lowest band.';
