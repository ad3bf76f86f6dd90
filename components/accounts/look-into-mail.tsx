'use client';

import { useState } from 'react';
import { ask } from '@/components/ui/ask';
import { Button } from '@/components/ui/button';
import { Notice } from '@/components/ui/notice';
import { useAsking } from './use-asking';

/** On a copy whose letters stay on the machine, whoever waits for one has to be told so. */
export function LocalMailHint() {
  return (
    <p className="text-small text-soft">
      This copy keeps its letters on the machine it runs on. An admin of its first workshop reads
      them under <span className="font-mono">/mail</span>.
    </p>
  );
}

interface LookIntoMailProps {
  email: string;
  password: string;
  localMail: boolean;
}

/** What everybody is told who has signed up, whether the address was new or not. */
export function LookIntoMail({ email, password, localMail }: LookIntoMailProps) {
  return (
    <div className="space-y-4">
      <Notice tone="good" title="Look into your mail">
        <p className="[overflow-wrap:anywhere]">
          A letter is on its way to <strong>{email}</strong>. The link in it makes the account; it
          is valid for 24 hours.
        </p>
      </Notice>
      {localMail && <LocalMailHint />}
      <SendAgain email={email} password={password} />
    </div>
  );
}

/** Asks for the letter with the confirmation once more. */
export function SendAgain({ email, password }: { email: string; password: string }) {
  const { busy, fault, run } = useAsking([]);
  const [sent, setSent] = useState(false);
  const send = async () => {
    setSent(false);
    setSent(await run(() => ask('/api/accounts/again', { body: { email, password } })));
  };
  return (
    <div className="space-y-2">
      <Button onClick={() => void send()} disabled={busy}>
        {busy ? 'Sending…' : 'Send the letter again'}
      </Button>
      {sent && <Notice>It was sent again; only the newest link is valid.</Notice>}
      {fault && <Notice tone="fault">{fault}</Notice>}
    </div>
  );
}
