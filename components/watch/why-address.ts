'use client';
import { useSearchParams } from 'next/navigation';
import { becauseInstant } from '@/lib/wording/instants';

/** Whose reasons are shown, and of which moment; null: of now. It lives in the address: a link can ask, and Back closes. */
export interface WhyAddress {
  channel: string;
  at: number | null;
}

export function useWhyAddress(): WhyAddress | null {
  const search = useSearchParams();
  const channel = search.get('why');
  return channel === null ? null : { channel, at: becauseInstant(search.get('at')) };
}

/** @param way `replace` for another moment of the same panel: Back is to close it, not to walk through them */
export function showWhy(address: WhyAddress | null, way: 'push' | 'replace' = 'push'): void {
  const url = new URL(window.location.href);
  url.searchParams.delete('why');
  url.searchParams.delete('at');
  if (address !== null) {
    url.searchParams.set('why', address.channel);
    if (address.at !== null) url.searchParams.set('at', new Date(address.at).toISOString());
  }
  window.history[`${way}State`](null, '', url);
}
