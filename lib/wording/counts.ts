const words = [
  'no',
  'one',
  'two',
  'three',
  'four',
  'five',
  'six',
  'seven',
  'eight',
  'nine',
  'ten',
  'eleven',
  'twelve',
];

/** Small counts are words inside a sentence. @example countWord(4) === 'four', countWord(31) === '31' */
export function countWord(count: number): string {
  return words[count] ?? String(count);
}

/** @example counted(1, 'rule') === 'one rule', counted(4, 'rule') === 'four rules' */
export function counted(count: number, one: string, many = `${one}s`): string {
  return `${countWord(count)} ${count === 1 ? one : many}`;
}

/** First letter large, for the beginning of a sentence. */
export function capital(text: string): string {
  return text.charAt(0).toUpperCase() + text.slice(1);
}
