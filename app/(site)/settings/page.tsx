import type { Metadata } from 'next';
import Link from 'next/link';
import { AccountData } from '@/components/settings/account/account-data';
import { NameForm } from '@/components/settings/account/name-form';
import { PasswordForm } from '@/components/settings/account/password-form';
import { Sessions } from '@/components/settings/account/sessions';
import { CodeView } from '@/components/settings/code-view';
import { Keys } from '@/components/settings/keys';
import { SettingsSection } from '@/components/settings/section';
import { SignOut } from '@/components/settings/sign-out';
import { snippetFor } from '@/components/settings/snippet';
import { hasPassword, listKeys, listSessions, workshopsOf } from '@/lib/accounts';
import { readsLocalMail } from '@/lib/accounts/local-mail';
import { currentSession, personForPage } from '@/lib/accounts/session';
import { env } from '@/lib/env';

export const metadata: Metadata = { title: 'Settings' };

const LINK = 'text-snapline underline underline-offset-4';

export default async function SettingsPage() {
  const person = await personForPage('/settings');
  const session = await currentSession();
  const [keys, workshops, sessions, withPassword, withMail] = await Promise.all([
    listKeys(person),
    workshopsOf(person),
    listSessions(person, session?.id ?? null),
    hasPassword(person),
    readsLocalMail(person),
  ]);
  const server = new URL(env().NEXTAUTH_URL).origin;
  return (
    <div className="mx-auto max-w-page space-y-8">
      <div className="flex flex-wrap items-start justify-between gap-4">
        <div>
          <h1 className="font-serif text-head font-semibold [overflow-wrap:anywhere]">
            {person.name}
          </h1>
          <p className="text-soft [overflow-wrap:anywhere]">
            {[person.email, ...workshops.map((workshop) => workshop.name)].join(' · ')}
          </p>
          {withMail && (
            <p className="mt-1 text-small">
              <Link href="/mail" className={LINK}>
                Letters of this copy
              </Link>
            </p>
          )}
        </div>
        <SignOut />
      </div>
      <div className="grid items-start gap-x-8 gap-y-10 lg:grid-cols-2">
        <div className="min-w-0 space-y-10">
          <SettingsSection title="Name">
            <NameForm key={person.name} name={person.name} />
          </SettingsSection>
          <SettingsSection title="Password">
            {withPassword ? (
              <PasswordForm />
            ) : (
              <p className="text-soft">
                You sign in through another service and have no password here. If you want one,{' '}
                <Link href="/forgot" className={LINK}>
                  ask for it by mail
                </Link>
                .
              </p>
            )}
          </SettingsSection>
          <SettingsSection title="Where you are signed in">
            <Sessions sessions={sessions} />
          </SettingsSection>
          <SettingsSection title="Your data">
            <AccountData email={person.email} hasPassword={withPassword} />
          </SettingsSection>
        </div>
        <div className="min-w-0 space-y-10">
          <Keys keys={keys} />
          <section aria-labelledby="snippet" className="min-w-0 space-y-3">
            <h2 id="snippet" className="text-figure font-semibold">
              Calling the evaluation
            </h2>
            <p className="text-soft">
              A script or a machine asks this server for exact figures with a key. This runs as it
              stands in Node 20 or later; put the key into the environment, not into the file.
            </p>
            <CodeView text={snippetFor(server)} label="Example of a call, in JavaScript" />
          </section>
        </div>
      </div>
    </div>
  );
}
