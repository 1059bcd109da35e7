/** What sign-in and passwords answer when something is not right: in words, and by field where a field is meant. */
export interface Refusal {
  message: string;
  fields: Record<string, string>;
}

interface Body {
  code?: unknown;
  detail?: unknown;
  errors?: { path?: unknown; message?: unknown }[];
}

const WORDS: Record<string, string> = {
  INVALID_EMAIL_OR_PASSWORD: 'Address and password do not belong together. Look at both again.',
  INVALID_TOKEN: 'This link was used already, or is older than an hour. Ask for a new one.',
  INVALID_EMAIL: 'Give an e-mail address, such as name@example.org.',
};

/** @param path under /api, such as `/auth/sign-in/email` @returns null when it was done */
export async function sendAuth(path: string, body: object): Promise<Refusal | null> {
  let response: Response;
  try {
    response = await fetch(`/api${path}`, {
      method: 'POST',
      headers: { 'content-type': 'application/json' },
      body: JSON.stringify(body),
    });
  } catch {
    return { message: 'The server does not answer. What you typed is still here; try again.', fields: {} };
  }
  if (response.ok) return null;
  const told = (await response.json().catch(() => ({}))) as Body | null;
  const fields: Record<string, string> = {};
  for (const one of Array.isArray(told?.errors) ? told.errors : [])
    fields[String(one.path)] ??= String(one.message);
  const known = typeof told?.code === 'string' ? WORDS[told.code] : undefined;
  const detail = typeof told?.detail === 'string' ? told.detail : undefined;
  return { message: known ?? detail ?? 'That did not work just now. Try again in a minute.', fields };
}
