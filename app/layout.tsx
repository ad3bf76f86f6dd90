import 'katex/dist/katex.min.css';
import './globals.css';
import type { Metadata, Viewport } from 'next';
import { cookies } from 'next/headers';
import type { ReactNode } from 'react';
import { readTheme, THEME_COOKIE } from '@/components/ui/theme';
import { faces } from '@/fonts/faces';

export const metadata: Metadata = {
  title: { default: 'Surdwork', template: '%s · Surdwork' },
  description:
    'Shared notebooks for setting-out offices: lengths, angles and coordinates evaluated exactly.',
};

export const viewport: Viewport = {
  themeColor: [
    { media: '(prefers-color-scheme: light)', color: '#f2ede4' },
    { media: '(prefers-color-scheme: dark)', color: '#13181a' },
  ],
};

export default async function RootLayout({ children }: { children: ReactNode }) {
  const theme = readTheme((await cookies()).get(THEME_COOKIE)?.value);
  return (
    <html
      lang="en-GB"
      className={faces}
      {...(theme === 'system' ? {} : { 'data-theme': theme })}
      suppressHydrationWarning
    >
      <body className="flex min-h-dvh flex-col font-sans print:block print:min-h-0 text-base antialiased">
        {children}
      </body>
    </html>
  );
}
