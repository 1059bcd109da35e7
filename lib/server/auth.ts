import 'server-only';
import { betterAuth } from 'better-auth';
import { drizzleAdapter } from 'better-auth/adapters/drizzle';
import { hashPassword as scrypt } from 'better-auth/crypto';
import { organization } from 'better-auth/plugins';
import { createAccessControl } from 'better-auth/plugins/access';
import { v7 as uuid } from 'uuid';
import { everyHolding } from '@/db/client';
import { findMembership } from '@/db/queries/people';
import * as tables from '@/db/schema/auth';
import { env } from './env';
import { invitationLetter, resetLetter } from './letters';
import { log } from './log';
import { sendLetter } from './mail';
import { trustedOrigins } from './origins';
import { may, PERMISSIONS, isRole, ROLES, type Action, type Role } from './permissions';

/** Who asks, and for which holding. */
export interface Viewer {
  userId: string;
  email: string;
  name: string;
  holdingId: string;
  holdingName: string;
  role: Role;
  sessionId: string;
}

// The organization plugin's own endpoints are asked about these; everything else asks the permission table itself.
const statement = {
  organization: ['update'],
  member: ['create', 'update', 'delete'],
  invitation: ['create', 'cancel'],
  action: Object.keys(PERMISSIONS) as Action[],
} as const;
const control = createAccessControl(statement);

function pluginRole(role: Role) {
  const people = may(role, 'people.manage');
  return control.newRole({
    organization: may(role, 'holding.manage') ? ['update'] : [],
    member: people ? ['create', 'update', 'delete'] : [],
    invitation: people ? ['create', 'cancel'] : [],
    action: statement.action.filter((action) => may(role, action)),
  });
}

function make() {
  const { AUTH_SECRET, PUBLIC_URL } = env();
  const isHttps = PUBLIC_URL.startsWith('https://');
  return betterAuth({
    appName: 'Middenward',
    baseURL: PUBLIC_URL,
    secret: AUTH_SECRET,
    telemetry: { enabled: false },
    trustedOrigins: trustedOrigins(PUBLIC_URL),
    database: drizzleAdapter(everyHolding(), { provider: 'pg', schema: tables }),
    logger: { log: (level, message) => log()[level](message) },
    emailAndPassword: {
      enabled: true,
      // People come by invitation only.
      disableSignUp: true,
      minPasswordLength: 15,
      maxPasswordLength: 256,
      revokeSessionsOnPasswordReset: true,
      sendResetPassword: ({ user, token }) => sendLetter(resetLetter(user, token)),
    },
    // The built-in rule of three in ten seconds is per process and path; ours stands in sign-in-limit.ts.
    rateLimit: { enabled: false },
    session: { cookieCache: { enabled: false }, expiresIn: 30 * 86_400, updateAge: 86_400 },
    advanced: {
      database: { generateId: () => uuid() },
      cookiePrefix: 'middenward',
      useSecureCookies: false,
      defaultCookieAttributes: { httpOnly: true, sameSite: 'lax', path: '/', secure: isHttps },
      // The library's own prefix would be __Secure-; __Host- also keeps other hosts of the domain from setting it.
      cookies: { session_token: { name: isHttps ? '__Host-middenward.session' : 'middenward.session' } },
    },
    databaseHooks: {
      session: {
        create: {
          before: async (session) => {
            const membership = await findMembership(session.userId, null);
            return { data: { ...session, activeOrganizationId: membership?.holdingId ?? null } };
          },
        },
      },
    },
    plugins: [
      organization({
        ac: control,
        roles: Object.fromEntries(ROLES.map((role) => [role, pluginRole(role)])),
        allowUserToCreateOrganization: false,
        disableOrganizationDeletion: true,
        sendInvitationEmail: ({ id, email, role, organization: holding, inviter }) =>
          sendLetter(
            invitationLetter({ id, email, role, holdingName: holding.name, inviter: inviter.user.name }),
          ),
      }),
    ],
  });
}

type Auth = ReturnType<typeof make>;
// A bundler may load this module twice in one process; the instance stays one.
const kept = globalThis as { middenwardAuth?: Auth };

export function auth(): Auth {
  return (kept.middenwardAuth ??= make());
}

/**
 * The person behind a request's cookie, in the holding that they work in; null when nobody is signed in, or when they
 * belong to no holding any more. Works in plain Node, for the live feed too.
 */
export async function getSessionFromHeaders(headers: Headers): Promise<Viewer | null> {
  const found = await auth().api.getSession({ headers });
  if (found === null) return null;
  const membership = await findMembership(found.user.id, found.session.activeOrganizationId ?? null);
  if (membership === null || !isRole(membership.role)) return null;
  return {
    userId: found.user.id,
    email: found.user.email,
    name: found.user.name,
    holdingId: membership.holdingId,
    holdingName: membership.holdingName,
    role: membership.role,
    sessionId: found.session.id,
  };
}

/** For whoever makes people without a letter: the seed, and an accepted invitation. */
export function hashPassword(password: string): Promise<string> {
  return scrypt(password);
}
