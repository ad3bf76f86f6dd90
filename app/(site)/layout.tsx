import type { ReactNode } from 'react';
import { PageShell } from '@/components/site/page-shell';
import { currentPerson } from '@/lib/accounts/session';

export default async function SiteLayout({ children }: { children: ReactNode }) {
  const person = await currentPerson();
  return <PageShell who={person ? { name: person.name } : 'nobody'}>{children}</PageShell>;
}
