import type { Metadata, Viewport } from 'next';
import { headers } from 'next/headers';
import type { ReactNode } from 'react';
import { fontVariables } from './fonts';
import './globals.css';
import { Providers } from './providers';

export const metadata: Metadata = {
  title: { default: 'Underfall', template: '%s · Underfall' },
  description:
    'Seepage under and through dams, weirs, levees and cofferdams: a bracketed discharge, a flow net, and each check beside its hand calculation.',
  referrer: 'same-origin',
};

export const viewport: Viewport = { themeColor: '#f3f5f1', width: 'device-width', initialScale: 1 };

export default async function RootLayout({ children }: { children: ReactNode }) {
  // Reading a header also makes every page dynamic, which nonces need.
  const nonce = (await headers()).get('x-nonce') ?? undefined;
  return (
    <html lang="en" className={fontVariables}>
      <body>
        <Providers nonce={nonce}>{children}</Providers>
      </body>
    </html>
  );
}
