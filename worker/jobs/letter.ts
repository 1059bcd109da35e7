/** The little of RFC 5322 and MIME that the app's own letters need to be read again. Pure. */

export interface Letter {
  subject: string;
  text: string;
}

/** The subject and the plain text of a message; of several parts the first plain one. */
export function parseLetter(raw: string): Letter {
  const { headers, body } = split(raw);
  return { subject: decodeWords(headers.get('subject') ?? ''), text: plainText(headers, body).trimEnd() };
}

function split(raw: string): { headers: Map<string, string>; body: string } {
  const [head = '', ...rest] = raw.replaceAll('\r\n', '\n').split('\n\n');
  const headers = new Map<string, string>();
  // A folded header goes on in the next line, which begins with white space.
  for (const line of head.replace(/\n[ \t]+/g, ' ').split('\n')) {
    const colon = line.indexOf(':');
    if (colon > 0) headers.set(line.slice(0, colon).toLowerCase(), line.slice(colon + 1).trim());
  }
  return { headers, body: rest.join('\n\n') };
}

function plainText(headers: Map<string, string>, body: string): string {
  const boundary = /^multipart\/.*boundary="?([^";]+)"?/i.exec(headers.get('content-type') ?? '')?.[1];
  if (boundary === undefined) return decodeBody(body, headers.get('content-transfer-encoding') ?? '7bit');
  const parts = body
    .split(`--${boundary}`)
    .slice(1, -1)
    .map((part) => split(part.replace(/^\n/, '')));
  const isPlain = (part: { headers: Map<string, string> }) =>
    /^(text\/plain|multipart\/)/i.test(part.headers.get('content-type') ?? 'text/plain');
  const plain = parts.find(isPlain);
  return plain === undefined ? '' : plainText(plain.headers, plain.body);
}

function decodeBody(body: string, encoding: string): string {
  switch (encoding.toLowerCase()) {
    case 'base64':
      return Buffer.from(body, 'base64').toString('utf8');
    case 'quoted-printable':
      return quotedPrintable(body.replace(/=\n/g, ''));
    default:
      return body;
  }
}

function quotedPrintable(text: string): string {
  const bytes = text.replace(/=([0-9A-F]{2})/gi, (_, hex: string) =>
    String.fromCharCode(Number.parseInt(hex, 16)),
  );
  return Buffer.from(bytes, 'latin1').toString('utf8');
}

/** RFC 2047: `=?UTF-8?Q?…?=` and `=?UTF-8?B?…?=`; white space between two of them is none. */
function decodeWords(text: string): string {
  return text
    .replace(/\?=\s+=\?/g, '?==?')
    .replace(/=\?[^?]+\?([QB])\?([^?]*)\?=/gi, (_, kind: string, word: string) =>
      kind.toUpperCase() === 'B'
        ? Buffer.from(word, 'base64').toString('utf8')
        : quotedPrintable(word.replaceAll('_', ' ')),
    );
}
