import Link from 'next/link';
import { Logo } from '@/components/ui/logo';

interface SiteHeaderProps {
  /** The person signed in, if any. */
  name: string | null;
}

const LINK = 'underline-offset-4 hover:underline';

export function SiteHeader({ name }: SiteHeaderProps) {
  return (
    <header className="border-b border-hairline print:hidden">
      <div className="mx-auto flex max-w-sheet flex-wrap items-center justify-between gap-x-6 gap-y-1 px-3 py-2 sm:px-6">
        <Link href={name === null ? '/' : '/notebooks'} className="flex items-center gap-2">
          <Logo />
          <span className="text-figure font-semibold">Surdwork</span>
        </Link>
        <nav aria-label="Main" className="flex flex-wrap items-center gap-x-5 gap-y-1 text-small">
          {name === null ? (
            <>
              <Link className={LINK} href="/help">
                How to write cells
              </Link>
              <Link className={LINK} href="/sign-in">
                Sign in
              </Link>
            </>
          ) : (
            <>
              <Link className={LINK} href="/notebooks">
                Notebooks
              </Link>
              <Link className={LINK} href="/help">
                How to write cells
              </Link>
              <Link className={`${LINK} max-w-40 truncate`} href="/settings" title={name}>
                {name}
              </Link>
            </>
          )}
        </nav>
      </div>
    </header>
  );
}
