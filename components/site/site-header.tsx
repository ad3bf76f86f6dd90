import Link from 'next/link';
import { Logo } from '@/components/ui/logo';
import { ReferenceLink } from './reference-link';

interface SiteHeaderProps {
  /** The person signed in; `guest` for whoever came by a client link and needs no way in. */
  who: { name: string } | 'nobody' | 'guest';
}

const LINK = 'underline-offset-4 hover:underline';

export function SiteHeader({ who }: SiteHeaderProps) {
  const signedIn = typeof who === 'object';
  return (
    <header className="border-b border-hairline print:hidden">
      <div className="mx-auto flex max-w-sheet flex-wrap items-center justify-between gap-x-6 gap-y-1 px-3 py-2 sm:px-6">
        <Link href={signedIn ? '/notebooks' : '/'} className="flex items-center gap-2">
          <Logo />
          <span className="text-figure font-semibold">Surdwork</span>
        </Link>
        {signedIn && (
          <form
            action="/search"
            role="search"
            aria-label="All notebooks"
            className="max-sm:order-last max-sm:w-full"
          >
            <label className="flex items-center gap-2 text-small">
              <span className="sr-only">Search all notebooks</span>
              <input
                type="search"
                name="q"
                maxLength={200}
                autoComplete="off"
                placeholder="Search titles, marks, text"
                className="min-h-8 w-full rounded-cut border border-rule bg-sheet px-2.5 text-ink placeholder:text-soft sm:w-56"
              />
            </label>
          </form>
        )}
        {who !== 'guest' && (
          <nav aria-label="Main" className="flex flex-wrap items-center gap-x-5 gap-y-1 text-small">
            {signedIn && (
              <>
                <Link className={LINK} href="/notebooks">
                  Notebooks
                </Link>
                <Link className={LINK} href="/workshops">
                  Workshop
                </Link>
              </>
            )}
            <Link className={LINK} href="/divide">
              Divide a circle
            </Link>
            <ReferenceLink className={LINK} />
            {signedIn ? (
              <Link className={`${LINK} max-w-40 truncate`} href="/settings" title={who.name}>
                {who.name}
              </Link>
            ) : (
              <Link className={LINK} href="/sign-in">
                Sign in
              </Link>
            )}
          </nav>
        )}
      </div>
    </header>
  );
}
