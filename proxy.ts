import { NextResponse, type NextRequest } from 'next/server';
import { contentPolicy, securityHeaders } from '@/lib/server/security-headers';

/** Next's name for what runs before every request: here only headers are set, nobody is let in or kept out. */
export function proxy(request: NextRequest): NextResponse {
  const { pathname, search } = request.nextUrl;
  const fixed = pathname.startsWith('/_next/static/');
  const isApi = pathname.startsWith('/api/');
  const nonce = btoa(String.fromCharCode(...crypto.getRandomValues(new Uint8Array(18))));
  const policy = contentPolicy(isApi ? null : nonce, request.headers.get('host'));

  const headers = new Headers(request.headers);
  headers.set('x-nonce', nonce);
  // Next takes the nonce of its own scripts from the request's policy.
  headers.set('content-security-policy', policy);
  headers.set('x-middenward-path', `${pathname}${search}`);
  const response = NextResponse.next({ request: { headers } });
  for (const [name, value] of securityHeaders()) response.headers.set(name, value);
  if (!fixed) {
    response.headers.set('content-security-policy', policy);
    response.headers.set('cache-control', 'no-store');
  }
  return response;
}
