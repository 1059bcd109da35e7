/** Passwords that are long enough and still the first that anybody tries, our own words first. */
const WORDS = [
  'middenward',
  'greenhouse',
  'compost',
  'compostheap',
  'password',
  'passphrase',
  'letmein',
  'welcome',
  'qwerty',
  'qwertyuiop',
  'asdfghjkl',
  'zxcvbnm',
  'iloveyou',
  'administrator',
  'admin',
  'owner',
  'grower',
  'installer',
  'changeme',
  'default',
  'secret',
  'trustno',
  'correcthorsebatterystaple',
];
const RUNS = [
  '01234567890123456789',
  'abcdefghijklmnopqrstuvwxyzabcdefghijklmnopqrstuvwxyz',
  '98765432109876543210',
];

/**
 * True for a password made of nothing but well-known words, digits in a row and repeats: 15 characters of those are
 * guessed as fast as 4.
 * @example isEasilyGuessed('greenhouse greenhouse 1') === true
 */
export function isEasilyGuessed(password: string): boolean {
  let rest = password.toLowerCase().replace(/[^a-z0-9]/g, '');
  if (isRepeated(rest) || RUNS.some((run) => run.includes(rest))) return true;
  for (const word of [...WORDS].sort((a, b) => b.length - a.length)) rest = rest.split(word).join('');
  rest = rest.replace(/\d+/g, '');
  return new Set(rest).size < 4;
}

function isRepeated(text: string): boolean {
  for (let size = 1; size <= Math.min(6, text.length / 2); size += 1) {
    if (
      text
        .slice(0, size)
        .repeat(Math.ceil(text.length / size))
        .slice(0, text.length) === text
    )
      return true;
  }
  return false;
}
