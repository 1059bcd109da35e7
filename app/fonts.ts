/**
 * The three faces, served by ourselves from the packages in node_modules. None is preloaded: over a slow line they are half
 * a second of what a page's script needs to answer, so a first visit fetches them behind it (bring-faces.tsx). Later they are
 * kept, and waited for 100 ms, so that nothing flickers. The extended halves carry a unicode-range, so a browser fetches
 * them only for a name that needs them. Stand-ins of the same widths are in globals.css.
 */
import localFont from 'next/font/local';

// next/font reads these calls at build time, so each range and path is a literal
const sentence = localFont({
  src: '../node_modules/@fontsource-variable/literata/files/literata-latin-wght-normal.woff2',
  weight: '200 900',
  display: 'fallback',
  preload: false,
  variable: '--face-sentence',
  adjustFontFallback: false,
  fallback: ['sentence-stand-in', 'Georgia', 'serif'],
});
const sentenceExtended = localFont({
  src: '../node_modules/@fontsource-variable/literata/files/literata-latin-ext-wght-normal.woff2',
  weight: '200 900',
  display: 'fallback',
  preload: false,
  variable: '--face-sentence-extended',
  adjustFontFallback: false,
  declarations: [{ prop: 'unicode-range', value: 'U+0100-02BA,U+1E00-1EF2,U+20A0-20AB,U+20AD-20C0' }],
});
const plain = localFont({
  src: '../node_modules/@fontsource-variable/atkinson-hyperlegible-next/files/atkinson-hyperlegible-next-latin-wght-normal.woff2',
  weight: '200 800',
  display: 'fallback',
  preload: false,
  variable: '--face-plain',
  adjustFontFallback: false,
  fallback: ['plain-stand-in', 'system-ui', 'sans-serif'],
});
const plainExtended = localFont({
  src: '../node_modules/@fontsource-variable/atkinson-hyperlegible-next/files/atkinson-hyperlegible-next-latin-ext-wght-normal.woff2',
  weight: '200 800',
  display: 'fallback',
  preload: false,
  variable: '--face-plain-extended',
  adjustFontFallback: false,
  declarations: [{ prop: 'unicode-range', value: 'U+0100-02BA,U+1E00-1EF2,U+20A0-20AB,U+20AD-20C0' }],
});
const figure = localFont({
  src: '../node_modules/@fontsource-variable/atkinson-hyperlegible-mono/files/atkinson-hyperlegible-mono-latin-wght-normal.woff2',
  weight: '200 800',
  display: 'fallback',
  preload: false,
  variable: '--face-figure',
  adjustFontFallback: false,
  fallback: ['figure-stand-in', 'ui-monospace', 'monospace'],
});

export const faces = [sentence, sentenceExtended, plain, plainExtended, figure]
  .map((face) => face.variable)
  .join(' ');

/** Their own names in the style sheet, without those that stand in for them, which not every system has. */
export const families = [sentence, plain, figure].map((face) => face.style.fontFamily.split(',')[0] ?? '');
