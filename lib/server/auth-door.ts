import 'server-only';
import { inHolding } from '@/db/client';
import { addAudit } from '@/db/queries/audit';
import { findMembership, findUserByEmail } from '@/db/queries/people';
import { isId } from '@/db/queries/reference';
import { Password } from '@/lib/schema/people';
import { appNow } from './app-clock';
import { auth } from './auth';
import { Problem, problemResponse } from './errors';
import { check } from './check';
import { addressOf, countTry } from './limits';
import { parseJson, readText } from './request-body';
import { z } from 'zod';

/** What of better-auth is reachable from outside; everything else of it is as absent as if it were not installed. */
const OPEN = new Set([
  'POST /sign-in/email',
  'POST /sign-out',
  'POST /request-password-reset',
  'POST /reset-password',
  'POST /change-password',
  'POST /revoke-other-sessions',
  'POST /organization/set-active',
]);

const Fields = z.object({
  email: z.string().max(320).optional(),
  newPassword: z.string().optional(),
  organizationId: z.string().nullable().optional(),
});

/** Looks at a request before better-auth does: what is open, how often, and whether a new password will do. */
export async function answerAuth(request: Request): Promise<Response> {
  try {
    const path = new URL(request.url).pathname.replace(/^\/api\/auth/, '');
    if (!OPEN.has(`${request.method} ${path}`)) throw new Problem('not-found');
    const text = await readText(request);
    const fields = check(Fields, text.trim() === '' ? {} : parseJson(text));
    const email = fields.email?.trim().toLowerCase() ?? null;
    if (path !== '/sign-out' && path !== '/organization/set-active') {
      const account = email === null ? [] : [`account ${path} ${email}`];
      countTry([`address ${path} ${addressOf(request.headers)}`, ...account]);
    }
    if (fields.newPassword !== undefined) check(z.object({ newPassword: Password }), fields);
    const { organizationId } = fields;
    if (typeof organizationId === 'string' && !isId(organizationId)) throw new Problem('not-found');
    const headers = new Headers(request.headers);
    headers.set('content-type', 'application/json');
    headers.delete('content-length');
    const body = text.trim() === '' ? '{}' : text;
    const response = await auth().handler(new Request(request.url, { method: 'POST', headers, body }));
    if (path === '/sign-in/email' && email !== null) await recordSignIn(email, response.ok);
    return await withoutToken(response);
  } catch (error) {
    return problemResponse(error);
  }
}

/** The session's token goes out in its HttpOnly cookie only; told in the body too, any script could read it. */
async function withoutToken(response: Response): Promise<Response> {
  if (!response.ok) return response;
  const text = await response.text();
  const told: unknown = text === '' ? null : JSON.parse(text);
  if (typeof told === 'object' && told !== null) Reflect.deleteProperty(told, 'token');
  const headers = new Headers(response.headers);
  headers.delete('content-length');
  return new Response(JSON.stringify(told), { status: response.status, headers });
}

/** Sign-ins and refused ones, in the audit log of the holding that the account belongs to. */
async function recordSignIn(email: string, signedIn: boolean): Promise<void> {
  const user = await findUserByEmail(email);
  const membership = user === null ? null : await findMembership(user.id, null);
  if (membership === null) return;
  const action = signedIn ? 'sign-in' : 'sign-in.refused';
  const at = await appNow();
  await inHolding(membership.holdingId, (holding) =>
    addAudit(holding, { at, by: email, action, subject: email, detail: {} }),
  );
}
