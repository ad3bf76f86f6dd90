import type { Metadata } from 'next';
import Link from 'next/link';
import { orNotFound } from '@/components/site/or-not-found';
import { Moment } from '@/components/ui/moment';
import { CELL, ROW, ScrollTable } from '@/components/ui/scroll-table';
import { listMail } from '@/lib/accounts/local-mail';
import { personForPage } from '@/lib/accounts/session';

export const metadata: Metadata = { title: 'Letters' };

/** The letters of a copy without an SMTP server, for the admins of its first workshop. */
export default async function MailPage() {
  const person = await personForPage('/mail');
  const letters = await orNotFound(listMail(person));
  return (
    <div className="mx-auto max-w-page space-y-5">
      <div className="space-y-1">
        <h1 className="font-serif text-head font-semibold">Letters of this copy</h1>
        <p className="max-w-prose text-soft">
          No SMTP server is named in the settings, so letters are kept on this machine and reach
          nobody. They hold ways into people’s accounts: only admins of the first workshop see them.
        </p>
      </div>
      {letters.length === 0 ? (
        <p>No letter has been written yet.</p>
      ) : (
        <ScrollTable caption="Letters, newest first" heads={['Subject', 'To', 'Written']}>
          {letters.map(({ id, subject, to, at }) => (
            <tr key={id} className={ROW}>
              <td className={CELL}>
                <Link
                  href={`/mail/${id}`}
                  className="text-snapline underline underline-offset-4 hover:no-underline"
                >
                  {subject}
                </Link>
              </td>
              <td className={CELL}>{to}</td>
              <td className={CELL}>
                <Moment at={at} />
              </td>
            </tr>
          ))}
        </ScrollTable>
      )}
    </div>
  );
}
