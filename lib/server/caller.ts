import 'server-only';
import { findKeyByHash, noteKeyUse } from '@/db/queries/key';
import { getSessionFromHeaders } from './auth';
import { Problem } from './errors';
import { trustedOrigins } from './origins';
import { isRole, type Role } from './permissions';
import { hashToken } from './tokens';

/** Who asks the interface: a person with a session, or a program with a key. */
export interface Caller {
  /** Of the person or the key. */
  id: string;
  /** What audit and records show: the e-mail address, or the key's name. */
  by: string;
  /** Null for a program. */
  userId: string | null;
  name: string;
  holdingId: string;
  holdingName: string;
  role: Role;
}

/** @throws Problem `not-signed-in`, or `wrong-origin` for a change that another site's page sends with the cookie */
export async function identify(request: Request): Promise<Caller> {
  const key = request.headers.get('x-api-key');
  if (key !== null) return identifyProgram(key);
  const viewer = await getSessionFromHeaders(request.headers);
  if (viewer === null) throw new Problem('not-signed-in');
  if (request.method !== 'GET') refuseForeignOrigin(request);
  const { userId, email, name, holdingId, holdingName, role } = viewer;
  return { id: userId, by: email, userId, name, holdingId, holdingName, role };
}

async function identifyProgram(key: string): Promise<Caller> {
  const found = await findKeyByHash(hashToken(key));
  if (found === null || !isRole(found.role)) throw new Problem('not-signed-in');
  await noteKeyUse(found.id);
  const { id, name, holdingId, holdingName, role } = found;
  return { id, by: `key ${name}`, userId: null, name, holdingId, holdingName, role };
}

/** A browser names the page that sends; a program with a session of its own need not. */
export function refuseForeignOrigin(request: Request): void {
  const origin = request.headers.get('origin');
  const site = request.headers.get('sec-fetch-site');
  const foreign = origin === null ? site === 'cross-site' : !trustedOrigins().includes(origin);
  if (foreign) throw new Problem('wrong-origin');
}
