import type { Metadata } from 'next';
import { notFound } from 'next/navigation';
import { NothingToWatch } from '@/components/shell/nothing-to-watch';
import { Watch } from '@/components/watch/watch';
import { requireViewer, viewerHouse } from '@/lib/server/next-session';
import { watchPage } from '@/lib/server/watch';

interface Props {
  params: Promise<{ house: string }>;
}

export async function generateMetadata({ params }: Props): Promise<Metadata> {
  return { title: `${(await viewerHouse((await params).house)).name}, watch` };
}

export default async function WatchPage({ params }: Props) {
  const viewer = await requireViewer();
  const house = await viewerHouse((await params).house);
  if (house.laidUpAt !== null) return <NothingToWatch house={{ slug: house.slug, name: house.name }} />;
  const data = (await watchPage(viewer, house)) ?? notFound();
  return <Watch {...data} />;
}
