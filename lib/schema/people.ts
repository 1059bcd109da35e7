import { z } from 'zod';
import { Name } from './common';

/** Letters only in the house's own words; the roles themselves stand in the permission table. */
const RoleName = z.string().min(1).max(20);

export const Email = z.email('Give an e-mail address, such as name@example.org.').max(254);
/** SP 800-63B-4: length, no composition rules. */
export const Password = z.string().min(15, 'At least 15 characters; a few plain words will do.').max(256, 'At most 256 characters.');

export const InvitationCreate = z.strictObject({ email: Email, role: RoleName });
export const MemberAmend = z.strictObject({ role: RoleName });
export const ApiKeyCreate = z.strictObject({ name: Name, role: RoleName });
export const SignIn = z.strictObject({ email: Email, password: z.string().min(1, 'Give your password.').max(256) });
