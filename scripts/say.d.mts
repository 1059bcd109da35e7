export class Trouble extends Error {
  constructor(sentence: string, code?: number);
  code: number;
}
export const CONFIGURATION: 78;
export function say(line: string): void;
export function giveUp(error: unknown): never;
