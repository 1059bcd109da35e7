import { env, isDevelopment } from './env';

/**
 * What a page may load and run. A script needs this answer's nonce, or to be loaded by one that had it.
 * Styles may stand in the page: charts place their parts by style attributes, and dialogs lock the page's scrolling by
 * a style element that they make themselves; neither can run anything.
 * @param nonce null for an answer that is no page
 */
export function contentPolicy(nonce: string | null, host: string | null): string {
  if (nonce === null) return "default-src 'none'; frame-ancestors 'none'; base-uri 'none'";
  // Not every browser counts the same host's ws: as 'self'.
  const live = host !== null && /^[\w.:[\]-]+$/.test(host) ? ` ws://${host} wss://${host}` : '';
  return [
    "default-src 'self'",
    `script-src 'self' 'nonce-${nonce}' 'strict-dynamic'${isDevelopment() ? " 'unsafe-eval'" : ''}`,
    "worker-src 'self'",
    "style-src 'self' 'unsafe-inline'",
    "img-src 'self' data: blob:",
    "font-src 'self'",
    `connect-src 'self'${live}`,
    "form-action 'self'",
    "object-src 'none'",
    "base-uri 'none'",
    "frame-ancestors 'none'",
  ].join('; ');
}

export function securityHeaders(): [string, string][] {
  const always: [string, string][] = [
    ['x-content-type-options', 'nosniff'],
    ['referrer-policy', 'same-origin'],
    ['cross-origin-opener-policy', 'same-origin'],
    ['cross-origin-resource-policy', 'same-origin'],
    ['permissions-policy', 'camera=(), microphone=(), geolocation=(), payment=(), usb=()'],
    ['x-frame-options', 'DENY'],
  ];
  const isHttps = env().PUBLIC_URL.startsWith('https://');
  return isHttps ? [...always, ['strict-transport-security', 'max-age=31536000']] : always;
}
