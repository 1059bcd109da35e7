import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';

const css = readFileSync('app/globals.css', 'utf8');

/** The colour tokens of one block of the style sheet. */
function tokens(opening: string): Record<string, string> {
  const from = css.indexOf(opening);
  const block = css.slice(from, css.indexOf('}', from));
  const hits = [...block.matchAll(/--([a-z]+): (#[0-9a-f]{6});/g)];
  return Object.fromEntries(hits.map((hit) => [hit[1] ?? '', hit[2] ?? '']));
}

function luminance(colour: string): number {
  const [red = 0, green = 0, blue = 0] = [1, 3, 5].map((place) => {
    const part = Number.parseInt(colour.slice(place, place + 2), 16) / 255;
    return part <= 0.04045 ? part / 12.92 : ((part + 0.055) / 1.055) ** 2.4;
  });
  return 0.2126 * red + 0.7152 * green + 0.0722 * blue;
}

/** WCAG 2.2, contrast ratio. */
function contrast(one: string, other: string): number {
  const [dark = 0, light = 0] = [luminance(one), luminance(other)].sort((a, b) => a - b);
  return (light + 0.05) / (dark + 0.05);
}

const themes = {
  light: tokens(':root {'),
  'dark by the switch': tokens(":root[data-theme='dark'] {"),
  'dark by the system': tokens(':root:not([data-theme]) {'),
};
const texts = ['ink', 'soft', 'outdoors', 'house', 'ember', 'core', 'base', 'warn', 'alarm'];

describe.each(Object.entries(themes))('in the %s theme', (_, theme) => {
  it.each(['paper', 'sheet', 'field'])('every text colour reads at 4.5:1 on %s', (ground) => {
    const short = texts.filter((text) => contrast(theme[text] ?? '', theme[ground] ?? '') < 4.5);
    expect(short).toEqual([]);
  });
  it('the outline of what can be pressed stands out at 3:1', () =>
    expect(
      Math.min(
        ...['paper', 'sheet', 'field'].map((ground) => contrast(theme.edge ?? '', theme[ground] ?? '')),
      ),
    ).toBeGreaterThanOrEqual(3));
  it('secondary text reads on a hovered line', () =>
    expect(contrast(theme.soft ?? '', theme.faint ?? '')).toBeGreaterThanOrEqual(4.5));
});

it('the switch and the system give one and the same dark', () =>
  expect(themes['dark by the switch']).toEqual(themes['dark by the system']));
