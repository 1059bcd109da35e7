import type { Metadata } from 'next';
import { notFound } from 'next/navigation';
import { ProvingView } from '@/components/proving/proving-view';
import { requireViewer, viewerHouse } from '@/lib/server/next-session';
import { provingPage } from '@/lib/server/proving-page';

interface Props {
  params: Promise<{ house: string; channel: string }>;
}

export const metadata: Metadata = { title: 'Proving' };

export default async function ProvingPage({ params }: Props) {
  const viewer = await requireViewer();
  const { house, channel } = await params;
  const start =
    (await provingPage(viewer, await viewerHouse(house), decodeURIComponent(channel))) ?? notFound();
  return (
    <ProvingView key={start.channel.id} start={start} mayProve={viewer.allowed.includes('channel.prove')} />
  );
}
