import type { ReactNode } from 'react';
import { cookies } from 'next/headers';
import { readTheme, THEME_COOKIE } from '@/components/ui/theme';
import { SiteFooter } from './site-footer';
import { SiteHeader } from './site-header';

interface PageShellProps {
  /** The person signed in; `guest` for whoever came by a client link and needs no way in. */
  who: { name: string } | 'nobody' | 'guest';
  children: ReactNode;
}

/** Skip link, head, content and foot of every page. */
export async function PageShell({ who, children }: PageShellProps) {
  const theme = readTheme((await cookies()).get(THEME_COOKIE)?.value);
  return (
    <>
      <a
        href="#content"
        className="sr-only z-50 bg-sheet px-4 py-2 text-snapline focus:not-sr-only focus:absolute focus:left-2 focus:top-2"
      >
        Skip to the content
      </a>
      <SiteHeader who={who} />
      <main
        id="content"
        tabIndex={-1}
        className="w-full grow px-3 py-5 outline-none sm:px-6 print:p-0"
      >
        {children}
      </main>
      <SiteFooter theme={theme} />
    </>
  );
}
