import { answerCalendar } from '@/lib/server/calendar';
import { open } from '@/lib/server/open-route';
import { getCalendar } from '@/lib/server/operations/open';

export const GET = open(getCalendar, ({ params }) => answerCalendar(params['feed'] ?? ''));
