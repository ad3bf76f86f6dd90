import type { ReactNode } from 'react';
import { PageShell } from '@/components/site/page-shell';

/** No session is looked at here: whoever has the link reads, signed in or not. */
export default function ClientLayout({ children }: { children: ReactNode }) {
  return <PageShell who="guest">{children}</PageShell>;
}
