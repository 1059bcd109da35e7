/** Why a reading is not good, in words. The causes are the core's (lib/control/quality.ts). */
const causes: Record<string, string> = {
  silent: 'silent',
  'never-heard': 'never heard',
  'out-of-range': 'out of its range',
  'one-wire-fault': 'its cable or plug is bad',
  'too-fast': 'changes too fast to be true',
  frozen: 'has not moved',
  'input-bad': 'a point it is made of is not trusted',
  'worker-was-away': 'not heard since the worker began',
};

/** @example qualityWords('bad', 'silent') === 'not trusted: silent'; a good reading says nothing */
export function qualityWords(quality: 'good' | 'uncertain' | 'bad', why: string | null): string | null {
  if (quality === 'good') return null;
  const cause = why === null ? '' : `: ${causes[why] ?? why.replaceAll('-', ' ')}`;
  return `${quality === 'bad' ? 'not trusted' : 'not sure'}${cause}`;
}
