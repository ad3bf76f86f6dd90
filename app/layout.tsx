import 'katex/dist/katex.min.css';
import './globals.css';
import type { Metadata, Viewport } from 'next';
import { cookies } from 'next/headers';
import type { ReactNode } from 'react';
import { SiteFooter } from '@/components/site/site-footer';
import { SiteHeader } from '@/components/site/site-header';
import { readTheme, THEME_COOKIE } from '@/components/ui/theme';
import { faces } from '@/fonts/faces';
import { currentPerson } from '@/lib/accounts/session';

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
  const person = await currentPerson();
  return (
    <html
      lang="en-GB"
      className={faces}
      {...(theme === 'system' ? {} : { 'data-theme': theme })}
      suppressHydrationWarning
    >
      <body className="flex min-h-dvh flex-col font-sans text-base antialiased">
        <a
          href="#content"
          className="sr-only z-50 bg-sheet px-4 py-2 text-snapline focus:not-sr-only focus:absolute focus:left-2 focus:top-2"
        >
          Skip to the content
        </a>
        <SiteHeader name={person?.name ?? null} />
        <main id="content" tabIndex={-1} className="w-full grow px-3 py-5 outline-none sm:px-6">
          {children}
        </main>
        <SiteFooter theme={theme} />
      </body>
    </html>
  );
}
