/** Where the history's page begins, as it stands in the address: instant and id of the alarm above it. */
export function readBefore(text: string | string[] | undefined): { at: number; id: string } | undefined {
  const parts = /^(\d{1,15})\.([0-9a-f]{8}(?:-[0-9a-f]{4}){3}-[0-9a-f]{12})$/.exec(
    typeof text === 'string' ? text : '',
  );
  return parts === null ? undefined : { at: Number(parts[1]), id: parts[2] ?? '' };
}
