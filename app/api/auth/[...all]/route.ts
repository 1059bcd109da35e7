import { answerAuth } from '@/lib/server/auth-door';

export const GET = answerAuth;
export const POST = answerAuth;
