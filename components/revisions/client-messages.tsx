import type { ReactNode } from 'react';
import { Card } from '@/components/site/card';
import { Button } from '@/components/ui/button';
import { Field } from '@/components/ui/field';
import { Moment } from '@/components/ui/moment';
import { Notice } from '@/components/ui/notice';

const Plain = ({ children }: { children: ReactNode }) => (
  <p className="max-w-prose text-note font-serif">{children}</p>
);

export function NothingIssued({ title, legalOwner }: { title: string; legalOwner: string }) {
  return (
    <Card title="Nothing has been issued yet">
      <Plain>
        {legalOwner} has given you this link to “{title}”. As soon as the first revision is issued,
        it stands here, at this same address.
      </Plain>
    </Card>
  );
}

export function Expired({ since }: { since: string }) {
  return (
    <Card title="This link has expired">
      <Plain>
        It opened until <Moment at={since} />. Ask whoever gave it to you for a new one.
      </Plain>
    </Card>
  );
}

interface PassphraseProps {
  token: string;
  /** How the last try went. */
  state: 'first' | 'wrong' | 'wait';
}

/** A plain form: it works without a script. */
export function AskPassphrase({ token, state }: PassphraseProps) {
  return (
    <Card title="This sheet asks for a passphrase">
      <Plain>Whoever gave you the link has the passphrase too.</Plain>
      {state === 'wait' && (
        <Notice tone="fault" title="Too many tries">
          Wait a quarter of an hour, then try again.
        </Notice>
      )}
      <form
        method="post"
        action={`/api/client/${token}/passphrase`}
        className="space-y-4"
        autoComplete="off"
      >
        <Field
          label="Passphrase"
          name="passphrase"
          type="password"
          required
          maxLength={200}
          fault={state === 'wrong' ? 'This is not the passphrase of the link.' : null}
        />
        <Button type="submit" look="main">
          Open the sheet
        </Button>
      </form>
    </Card>
  );
}
