import { redirect } from 'next/navigation';
import { viewerHouse } from '@/lib/server/next-session';

/** A house's bare address leads to what is seen of it first. */
export default async function HousePage({ params }: { params: Promise<{ house: string }> }) {
  redirect(`/${(await viewerHouse((await params).house)).slug}/watch`);
}
