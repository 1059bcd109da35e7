import { answerAuth } from '@/lib/server/auth-door';

export { answerAuth as GET, answerAuth as POST };
