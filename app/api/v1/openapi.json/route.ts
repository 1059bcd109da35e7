import { describe } from '@/lib/server/openapi';
import { open } from '@/lib/server/open-route';
import { getDescription } from '@/lib/server/operations/open';

export const GET = open(getDescription, () => Response.json(describe()));
