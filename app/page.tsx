import { redirect } from 'next/navigation';
import { inHolding } from '@/db/client';
import { readShell } from '@/db/queries/shell';
import { requireViewer } from '@/lib/server/next-session';

/** Watch of the first house; with none yet, the page where one is made. */
export default async function FrontPage() {
  const { holdingId } = await requireViewer();
  const [first] = await inHolding(holdingId, readShell);
  redirect(first === undefined ? '/new-house' : `/${first.slug}/watch`);
}
