'use client';

import Link from 'next/link';
import { usePathname } from 'next/navigation';

/** Leads to the reference; from a sheet it says which one, so that samples can go onto it. */
export function ReferenceLink({ className }: { className: string }) {
  const notebook = /^\/notebooks\/([^/]+)$/.exec(usePathname())?.[1];
  return (
    <Link className={className} href={notebook ? `/help?from=${notebook}` : '/help'}>
      How to write cells
    </Link>
  );
}
