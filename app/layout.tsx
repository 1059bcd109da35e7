import './globals.css';
import type { Metadata, Viewport } from 'next';
import { cookies } from 'next/headers';
import type { ReactNode } from 'react';
import { faces } from './fonts';

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

/** The theme is a cookie so that the server renders it: a page must not flash white at three in the morning. */
export default async function RootLayout({ children }: { children: ReactNode }) {
  const theme = (await cookies()).get('theme')?.value;
  return (
    <html lang="en" data-theme={theme === 'light' || theme === 'dark' ? theme : undefined} className={faces}>
      <body>{children}</body>
    </html>
  );
}
