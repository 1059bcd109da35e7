import { describe, expect, it } from 'vitest';
import { gapLines, gapNowWords, gapsOverWords } from '@/lib/wording/why-gaps';
import { american, scene, spaced } from './scene';

const gap = (from: string, to: string | null) => ({
  from: `2026-11-27T${from}Z`,
  to: to === null ? null : `2026-11-27T${to}Z`,
});
const early = gap('00:40:00', '00:41:00');
const long = gap('02:10:00', '02:14:00');
const late = gap('05:00:00', '05:02:00');
const open = gap('05:30:00', null);

describe('hours in which control did not run', () => {
  it('are none where there was none', () => {
    expect(gapsOverWords([], scene)).toBeNull();
    expect(gapNowWords([], scene)).toBeNull();
    expect(gapLines([], scene)).toEqual([]);
  });

  it('are one sentence with both its times where there was one', () => {
    expect(gapsOverWords([long], scene)).toBe(
      'Control was not running from 02:10 to 02:14: nothing was decided in that time.',
    );
    expect(gapLines([long], scene)).toEqual([]);
  });

  it('are one sentence however many there were, with the longest and the last', () =>
    expect(gapsOverWords([early, long, late], scene)).toBe(
      'Control was not running 3 times since 00:40, the longest from 02:10 to 02:14, the last from 05:00 to 05:02: nothing was decided in those times.',
    ));

  it('name the last once where it is the longest too, or as long', () => {
    expect(gapsOverWords([early, long], scene)).toContain('00:40, the last and longest from 02:10 to 02:14:');
    const asLong = gap('04:00:00', '04:04:00');
    expect(gapsOverWords([long, asLong], scene)).toContain(', the last and longest from 04:00 to 04:04:');
  });

  it('are told in the order in which they were, in whichever they came', () => {
    expect(gapsOverWords([late, long, early], scene)).toBe(gapsOverWords([early, long, late], scene));
    expect(gapLines([late, early, long], scene)).toEqual([
      'From 00:40 to 00:41',
      'From 02:10 to 02:14',
      'From 05:00 to 05:02',
    ]);
  });

  it('of a moment that is over are told between two times, for there may have been more since', () =>
    expect(gapsOverWords([early, late], scene, true)).toContain('2 times between 00:40 and 05:02, '));

  it('within one minute are told with how long they were', () => {
    const restart = gap('03:07:10', '03:07:28');
    expect(spaced(gapsOverWords([restart], scene) ?? '')).toBe(
      'Control was not running at 03:07 for 18 s: nothing was decided in that time.',
    );
    expect(gapLines([restart, long], scene).map(spaced)).toContain('At 03:07 for 18 s');
  });

  it('that go on are a sentence of their own, and not counted among those that are over', () => {
    expect(gapNowWords([long, open], scene)).toBe(
      'Control has not run since 05:30: what is shown is how things stood then.',
    );
    expect(gapNowWords([early, long], scene)).toBeNull();
    expect(gapsOverWords([long, open], scene)).toBe(gapsOverWords([long], scene));
    expect(gapsOverWords([open], scene)).toBeNull();
  });

  it('are read on the reader’s clock', () =>
    expect(spaced(gapsOverWords([long], american) ?? '')).toContain('from 2:10 am to 2:14 am'));
});
