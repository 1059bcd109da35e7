import './globals.css';
import type { Metadata, Viewport } from 'next';
import { cookies } from 'next/headers';
import type { ReactNode } from 'react';
import { BringFaces } from '@/components/shell/bring-faces';
import { faces, families } from './fonts';

export const metadata: Metadata = {
  title: { default: 'Middenward', template: '%s · Middenward' },
  description: 'Keeps a greenhouse warm from a compost heap without wearing the heap out',
};

export const viewport: Viewport = {
  width: 'device-width',
  initialScale: 1,
  themeColor: [
    { media: '(prefers-color-scheme: light)', color: '#f3f0e8' },
    { media: '(prefers-color-scheme: dark)', color: '#141311' },
  ],
};

/**
 * The theme is a cookie so that the server renders it: a page must not flash white at three in the morning. So is whether
 * this browser keeps our faces already.
 */
export default async function RootLayout({ children }: { children: ReactNode }) {
  const kept = await cookies();
  const theme = kept.get('theme')?.value;
  const hasFaces = kept.get('faces')?.value === 'kept';
  return (
    <html
      lang="en"
      data-theme={theme === 'light' || theme === 'dark' ? theme : undefined}
      data-faces={hasFaces ? undefined : 'later'}
      className={faces}
    >
      <body>
        {children}
        {hasFaces ? null : <BringFaces families={families} />}
      </body>
    </html>
  );
}
