/** Fields of the form by the dotted paths of the interface, for what the server says of a body. */

const renamed: [RegExp, string][] = [
  [/^rest\.until\.point$/, 'waitsAt'],
  [/^rest\.until\.level$/, 'waitLevel'],
  [/^rest\.leastGain\.kelvin$/, 'gain'],
  [/^rest\.leastGain\.after$/, 'gainAfter'],
  [/^rest\.leastGain\.intake$/, 'gainIntake'],
  [/^rest\.leastGain\.return$/, 'gainReturn'],
  [/^rest\.leastGain$/, 'gain'],
  [/^rest\.until$/, 'waitsAt'],
  [/^rest$/, 'longestDraw'],
  [/^rest\./, ''],
  [/^season\.from$/, 'seasonFromDay'],
  [/^season\.to$/, 'seasonToDay'],
  [/^season$/, 'seasonFromDay'],
  [/^hours\.from$/, 'hoursFrom'],
  [/^hours\.to$/, 'hoursTo'],
  [/^hours$/, 'hoursFrom'],
  [/^band$/, 'band.0.low'],
  [/^standIns$/, 'standIns.0.point'],
];

/** Conditions keep their own paths. @example fieldOfPath('rest.until.level') === 'waitLevel' */
export function fieldOfPath(path: string): string {
  for (const [pattern, field] of renamed) if (pattern.test(path)) return path.replace(pattern, field);
  return path;
}

/** Frames to wait for a field that a press has only just brought up: two seconds on most screens. */
const FRAMES = 120;

/**
 * Brings the focus to a field, or to the first of those under it (`band.0` has its low), also where it is not there yet
 * because its part of the form is being loaded.
 */
export function focusField(field: string, frames = FRAMES): void {
  const named = [...document.querySelectorAll<HTMLElement>('form [name], form [data-field]')];
  const nameOf = (one: HTMLElement) => one.getAttribute('name') ?? one.dataset.field ?? '';
  const found =
    named.find((one) => nameOf(one) === field) ??
    named.find((one) => nameOf(one).startsWith(`${field}.`) && one.getAttribute('type') !== 'range');
  if (found !== undefined) {
    found.focus();
    found.scrollIntoView({ block: 'center' });
  } else if (frames > 0) requestAnimationFrame(() => focusField(field, frames - 1));
}
