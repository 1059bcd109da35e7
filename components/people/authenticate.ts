/** What of a person's own sign-in can be changed from inside: told in words, and by field where a field is meant. */
export interface Refusal {
  message: string;
  fields: Record<string, string>;
}

const SILENT = 'The server does not answer, so nothing was changed. What you typed is still here; try again.';

/** @returns null when it was done */
export async function authenticate(what: string, body: object): Promise<Refusal | null> {
  const response = await fetch(`/api/auth/${what}`, {
    method: 'POST',
    headers: { 'content-type': 'application/json' },
    body: JSON.stringify(body),
  }).catch(() => null);
  if (response === null) return { message: SILENT, fields: {} };
  if (response.ok) return null;
  const told: unknown = await response.json().catch(() => null);
  if (typeof told !== 'object' || told === null) return { message: SILENT, fields: {} };
  if ('code' in told && told.code === 'INVALID_PASSWORD')
    return { message: '', fields: { currentPassword: 'That is not the password of this account.' } };
  if ('code' in told && told.code === 'SESSION_NOT_FRESH')
    return {
      message: 'You signed in more than a day ago. Sign out and in again, then try once more.',
      fields: {},
    };
  const fields: Record<string, string> = {};
  if ('errors' in told && Array.isArray(told.errors))
    for (const one of told.errors as { path?: unknown; message?: unknown }[])
      fields[String(one.path)] ??= String(one.message);
  const detail = 'detail' in told && typeof told.detail === 'string' ? told.detail : null;
  return { message: detail ?? 'That did not work just now. Try again in a minute.', fields };
}
