import { forgetBook } from '@/components/heap/book-facts';

/** Goes on in another holding that the person belongs to. @returns in words why not; on success the page is left */
export async function workIn(holdingId: string): Promise<string> {
  const failed = 'The server does not answer; you are still in the holding you were in. Try again.';
  const answer = await fetch('/api/auth/organization/set-active', {
    method: 'POST',
    headers: { 'content-type': 'application/json' },
    body: JSON.stringify({ organizationId: holdingId }),
  }).catch(() => null);
  if (answer?.ok !== true) return failed;
  // all that is on the page, and in the browser's memory, is the other holding's
  forgetBook();
  window.location.assign('/');
  return '';
}
