import { z } from 'zod';

export const Me = z.strictObject({
  name: z.string(),
  email: z.string().nullable(),
  holding: z.strictObject({ id: z.string(), name: z.string() }),
  role: z.string(),
  allowed: z.array(z.string()),
});
export const Member = z.strictObject({
  id: z.string(),
  name: z.string(),
  email: z.string(),
  role: z.string(),
  since: z.string(),
});
export const Invitation = z.strictObject({
  id: z.string(),
  email: z.string(),
  role: z.string(),
  expiresAt: z.string(),
  createdAt: z.string(),
});
export const ApiKey = z.strictObject({
  id: z.string(),
  name: z.string(),
  role: z.string(),
  createdBy: z.string(),
  createdAt: z.string(),
  lastUsedAt: z.string().nullable(),
});
export const ApiKeyWithSecret = z.strictObject({ ...ApiKey.shape, key: z.string() });
export const AuditEntry = z.strictObject({
  id: z.string(),
  at: z.string(),
  by: z.string(),
  action: z.string(),
  subject: z.string(),
  detail: z.record(z.string(), z.unknown()),
});
export const Letter = z.strictObject({
  id: z.string(),
  at: z.string(),
  from: z.string(),
  to: z.string(),
  subject: z.string(),
  text: z.string(),
});
