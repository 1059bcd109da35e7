/** Where to go after signing in: a path of our own only, so that a link to us cannot lead on to somebody else. */
export function ownPath(given: string | string[] | undefined): string {
  if (typeof given !== 'string' || !/^\/(?![/\\])/.test(given) || given.length > 2000) return '/';
  try {
    const url = new URL(given, 'http://own.invalid');
    return url.host === 'own.invalid' ? `${url.pathname}${url.search}` : '/';
  } catch {
    return '/';
  }
}
