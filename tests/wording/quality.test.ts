import { describe, expect, it } from 'vitest';
import { backWords, causeWords, qualityWords, UNSTEADY_WORDS } from '@/lib/wording/quality';
import { american, at, scene, spaced } from './scene';

describe('A point that is not trusted', () => {
  it('says since when and why; a good one says nothing', () => {
    expect(qualityWords({ quality: 'bad', why: 'silent', since: at('02:10') }, scene)).toBe(
      'not trusted since 02:10: silent',
    );
    expect(
      spaced(qualityWords({ quality: 'uncertain', why: 'frozen', since: at('02:10') }, american) ?? ''),
    ).toBe('not sure since 2:10 am: has not moved');
    expect(qualityWords({ quality: 'bad', why: null }, scene)).toBe('not trusted');
    expect(qualityWords({ quality: 'good', why: null, since: null }, scene)).toBeNull();
  });

  it.each([
    ['never-spoke', 'never heard'],
    ['out-of-range', 'out of its range'],
    ['one-wire-fault', 'its cable or plug is bad'],
    ['too-fast', 'changes too fast to be true'],
    ['unsteady', 'comes and goes'],
    ['worker-was-away', 'not heard since the worker began'],
    ['input-bad', 'a point it is made of is not trusted'],
    ['input-uncertain', 'input uncertain'],
  ])('%s is said as “%s”', (why, words) => expect(causeWords(why)).toBe(words));

  it('that is good again says when it came back, and what it was', () => {
    expect(backWords({ why: 'silent', from: at('02:10'), to: at('02:40') }, scene)).toBe(
      'came back 02:40; silent from 02:10',
    );
  });

  it('that comes and goes says by which rule it is believed again', () => {
    expect(UNSTEADY_WORDS).toBe(
      'It dropped out three times within an hour. It is believed again once it has been good for 10 min without a break; until then rules use their stand-in, and only frost listens to it.',
    );
  });
});
