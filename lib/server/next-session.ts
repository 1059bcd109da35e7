import 'server-only';
import { headers } from 'next/headers';
import { notFound, redirect } from 'next/navigation';
import { cache } from 'react';
import { inHolding } from '@/db/client';
import { findHouse } from '@/db/queries/house';
import { getSessionFromHeaders, type Viewer } from './auth';
import { allowedTo, type Action } from './permissions';

/** The one file of lib/server that knows Next, so that the worker can load all others. */
export interface PageViewer extends Viewer {
  allowed: Action[];
}

/** Once a request, however many components ask. */
export const viewer = cache(async (): Promise<PageViewer | null> => {
  const found = await getSessionFromHeaders(new Headers(await headers()));
  return found === null ? null : { ...found, allowed: allowedTo(found.role) };
});

/** For pages behind the door: whoever is not signed in goes to sign in, and comes back to where they were going. */
export async function requireViewer(): Promise<PageViewer> {
  const found = await viewer();
  if (found !== null) return found;
  const path = (await headers()).get('x-middenward-path');
  redirect(path === null || path === '/' ? '/sign-in' : `/sign-in?next=${encodeURIComponent(path)}`);
}

/** The house of a page's address; another holding's is as absent as one that never was. */
export const viewerHouse = cache(async (slug: string) => {
  const { holdingId } = await requireViewer();
  return (await inHolding(holdingId, (holding) => findHouse(holding, slug))) ?? notFound();
});
