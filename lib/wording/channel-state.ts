/** How a load stands, in one word, and what its relay says of that. */
const ON: Record<string, string> = {
  motor: 'Running',
  vent: 'Open',
  valve: 'Open',
  heater: 'Heating',
  lamp: 'Lit',
};
const OFF: Record<string, string> = { vent: 'Shut', valve: 'Shut' };

export interface Standing {
  state: 'on' | 'off';
  reported: 'on' | 'off' | null;
  claim: string;
  lockedOut: boolean;
}

/** @example stateWord({state: 'off', claim: 'rest', …}, 'motor') === 'Resting' */
export function stateWord(channel: Standing, loadKind: string): string {
  if (channel.lockedOut) return 'Locked out';
  if (channel.state === 'on') return ON[loadKind] ?? 'On';
  return channel.claim === 'rest' ? 'Resting' : (OFF[loadKind] ?? 'Off');
}

/** Only where the relay does not plainly say the same; null where it does. */
export function reportWords(channel: Standing): string | null {
  if (channel.reported === channel.state) return null;
  return channel.reported === null
    ? 'Its relay has not been heard.'
    : `Its relay still says ${channel.reported}.`;
}

/** What the relays fall to by themselves. @example "The gate-heap fan and the ground fan stand still." */
export function safeStates(channels: { label: string; loadKind: string; contact: 'NO' | 'NC' }[]): {
  still: string[];
  running: string[];
} {
  return {
    still: channels.filter((one) => one.contact === 'NO').map((one) => one.label),
    running: channels.filter((one) => one.contact === 'NC').map((one) => one.label),
  };
}
