import type { Metadata } from 'next';
import { CodeView } from '@/components/settings/code-view';
import { Keys } from '@/components/settings/keys';
import { SignOut } from '@/components/settings/sign-out';
import { snippetFor } from '@/components/settings/snippet';
import { listKeys, workshopsOf } from '@/lib/accounts';
import { personForPage } from '@/lib/accounts/session';
import { env } from '@/lib/env';

export const metadata: Metadata = { title: 'Settings' };

export default async function SettingsPage() {
  const person = await personForPage('/settings');
  const [keys, workshops] = await Promise.all([listKeys(person), workshopsOf(person)]);
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
        </div>
        <SignOut />
      </div>
      <div className="grid gap-8 lg:grid-cols-2">
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
  );
}
