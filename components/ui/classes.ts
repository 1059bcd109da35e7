/** Class names that apply, in one string. Later ones do not override earlier ones: do not hand in rivals. */
export function classes(...names: (string | false | null | undefined)[]): string {
  return names.filter(Boolean).join(' ');
}
