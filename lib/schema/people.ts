import { z } from 'zod';
import { Name } from './common';
import { isEasilyGuessed } from './password';

/** Letters only in the house's own words; the roles themselves stand in the permission table. */
const RoleName = z.string().min(1).max(20);

export const Email = z.email('Give an e-mail address, such as name@example.org.').max(254);
/** SP 800-63B-4: length, no composition rules, and none of the first that are tried. */
export const Password = z
  .string()
  .min(15, 'At least 15 characters; a few plain words will do.')
  .max(256, 'At most 256 characters.')
  .refine(
    (value) => !isEasilyGuessed(value),
    'That is one of the first to be guessed; add a few words of your own.',
  );

export const InvitationCreate = z.strictObject({ email: Email, role: RoleName });
export const InvitationAccept = z.strictObject({
  /** From the letter: it proves that the address is theirs. */
  token: z.string().min(1).max(200),
  name: Name.optional(),
  password: Password.optional(),
});
export const MemberAmend = z.strictObject({ role: RoleName });
export const ApiKeyCreate = z.strictObject({ name: Name, role: RoleName });
export const SignIn = z.strictObject({
  email: Email,
  password: z.string().min(1, 'Give your password.').max(256),
});
export const PasswordForgotten = z.strictObject({ email: Email });
export const PasswordReset = z.strictObject({ token: z.string().min(1).max(200), newPassword: Password });
