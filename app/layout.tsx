import type { Metadata, Viewport } from 'next';
import { cookies } from 'next/headers';
import type { ReactNode } from 'react';
import { fontVariables } from './fonts';
import './globals.css';
import { parseTheme, THEME_COOKIE, themeAttribute } from '@/components/theme';
import { Toaster } from '@/components/toaster';

// The content security policy signs every script by a nonce of the request; a page made beforehand would carry none.
export const dynamic = 'force-dynamic';

export const metadata: Metadata = {
  title: { default: 'Ohmstead', template: '%s · Ohmstead' },
  description: 'Draw a linear network and have every voltage and current while you draw; review it, sign it off, clone it.',
  robots: { index: false, follow: false },
};

export const viewport: Viewport = {
  width: 'device-width',
  initialScale: 1,
  themeColor: [
    { media: '(prefers-color-scheme: light)', color: '#ffffff' },
    { media: '(prefers-color-scheme: dark)', color: '#1a2028' },
  ],
};

export default async function RootLayout({ children }: { readonly children: ReactNode }) {
  const theme = parseTheme((await cookies()).get(THEME_COOKIE)?.value);
  return (
    <html lang="en" data-theme={themeAttribute(theme)} className={fontVariables}>
      <body className="bg-paper text-ink antialiased">
        {children}
        <Toaster />
      </body>
    </html>
  );
}
