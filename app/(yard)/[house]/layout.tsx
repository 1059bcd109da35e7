import type { ReactNode } from 'react';
import { viewerHouse } from '@/lib/server/next-session';

/** A house that is not this holding's is not found, whichever page of it was asked for. */
export default async function HouseLayout({
  children,
  params,
}: {
  children: ReactNode;
  params: Promise<{ house: string }>;
}) {
  await viewerHouse((await params).house);
  return children;
}
