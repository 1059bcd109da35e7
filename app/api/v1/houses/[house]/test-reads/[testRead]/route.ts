import { serve } from '@/lib/server/guard';
import { getTestRead } from '@/lib/server/operations/buses';

export const GET = serve(getTestRead, ({ things }) => ({ body: things.testRead }));
