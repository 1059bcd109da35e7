/**
 * Frames on a broker carry a signature, since whoever may publish there could speak for any node, and whoever may
 * subscribe could read a token. It is the frame's last key, made over its topic, what went before, and its text.
 */

/** Topics of a node, by its id: keys are a house's own, and a broker may carry nodes of many. */
export function topicsOf(nodeId: string): { up: string; down: string } {
  const own = `middenward/v1/${nodeId}`;
  return { up: `${own}/up`, down: `${own}/down` };
}

const ENDING = /,"mac":"([0-9a-f]{64})"\}$/;

/**
 * @param before the mac of what this frame builds on: nothing for `hello`, the hello's for `welcome`, then the welcome's
 * @returns what is signed
 */
export function signedText(topic: string, before: string, frame: string): string {
  return `${topic}\n${before}\n${frame}`;
}

/** @example withMac('{"type":"hello"}', 'ab…') === '{"type":"hello","mac":"ab…"}' */
export function withMac(frame: string, mac: string): string {
  return `${frame.slice(0, -1)},"mac":"${mac}"}`;
}

/** A signed text taken apart; null where there is no signature at its end. */
export function splitMac(text: string): { frame: string; mac: string } | null {
  const mac = ENDING.exec(text)?.[1];
  return mac === undefined ? null : { frame: `${text.slice(0, -`,"mac":"${mac}"}`.length)}}`, mac };
}
