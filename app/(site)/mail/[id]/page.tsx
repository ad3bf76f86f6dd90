import type { Metadata } from 'next';
import Link from 'next/link';
import { LetterText } from '@/components/mail/letter-text';
import { orNotFound } from '@/components/site/or-not-found';
import { Moment } from '@/components/ui/moment';
import { readMail } from '@/lib/accounts/local-mail';
import { personForPage } from '@/lib/accounts/session';

export const metadata: Metadata = { title: 'Letter' };

interface PageProps {
  params: Promise<{ id: string }>;
}

export default async function LetterPage({ params }: PageProps) {
  const { id } = await params;
  const person = await personForPage(`/mail/${id}`);
  const letter = await orNotFound(readMail(person, id));
  return (
    <div className="mx-auto max-w-page space-y-5">
      <div className="space-y-1">
        <p className="text-small">
          <Link href="/mail" className="text-snapline underline underline-offset-4">
            All letters
          </Link>
        </p>
        <h1 className="font-serif text-head font-semibold [overflow-wrap:anywhere]">
          {letter.subject}
        </h1>
        <p className="text-soft [overflow-wrap:anywhere]">
          To {letter.to}, written <Moment at={letter.at} />
        </p>
      </div>
      <div className="grid gap-6 lg:grid-cols-[minmax(0,7fr)_minmax(0,6fr)]">
        <section aria-labelledby="as-text" className="min-w-0 space-y-2">
          <h2 id="as-text" className="text-figure font-semibold">
            As text
          </h2>
          <LetterText text={letter.text} />
        </section>
        <section aria-labelledby="as-html" className="min-w-0 space-y-2">
          <h2 id="as-html" className="text-figure font-semibold">
            As HTML
          </h2>
          {/* No script, no form and no origin of ours in there; a link opens a page of its own. */}
          <iframe
            title={`The letter “${letter.subject}” as HTML`}
            sandbox="allow-popups allow-popups-to-escape-sandbox"
            srcDoc={letter.html}
            className="h-[36rem] w-full border border-rule bg-[#f2ede4]"
          />
        </section>
      </div>
    </div>
  );
}
