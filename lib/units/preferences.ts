/** How a reader wants to read. Everything inside stays in SI; this is applied at the edge only. */
export interface Preferences {
  temperature: 'C' | 'F';
  clock: 24 | 12;
  flow: 'L/s' | 'cfm';
  length: 'm' | 'ft';
}

export const USUAL: Preferences = { temperature: 'C', clock: 24, flow: 'L/s', length: 'm' };
