'use client';

import { useState } from 'react';
import type { NotebookContent } from '@/lib/notebooks/content';
import { ask, sayFault } from '@/components/ui/ask';
import { Button } from '@/components/ui/button';
import type { Place } from '../state/uses';
import { Part } from './part';
import { certificateQuestion } from './question-of-line';

type Answer = { kind: 'certificate'; certificate: object } | { kind: 'none'; message: string };

/** Hands a text over as a file of the person's own. */
function saveFile(name: string, text: string) {
  const address = URL.createObjectURL(new Blob([text], { type: 'application/json' }));
  const anchor = document.createElement('a');
  anchor.href = address;
  anchor.download = name;
  anchor.click();
  URL.revokeObjectURL(address);
}

interface CertificatePartProps {
  content: NotebookContent;
  at: Place;
  name: string;
}

/** The certificate of the value as a file, which a short separate program checks without the engine. */
export function CertificatePart({ content, at, name }: CertificatePartProps) {
  const [said, setSaid] = useState<{ fault: boolean; words: string } | null>(null);
  const [waiting, setWaiting] = useState(false);

  const download = async () => {
    setWaiting(true);
    setSaid(null);
    try {
      const answer = await ask<Answer>('/api/certificate', {
        body: certificateQuestion(content, at),
      });
      if (answer.kind === 'none') setSaid({ fault: true, words: answer.message });
      else {
        const file = `certificate-${name.replace(/[^\p{L}\d_]+/gu, '-') || 'value'}.json`;
        saveFile(file, `${JSON.stringify(answer.certificate, null, 1)}\n`);
        setSaid({ fault: false, words: `${file} is made.` });
      }
    } catch (thrown) {
      setSaid({ fault: true, words: sayFault(thrown) });
    } finally {
      setWaiting(false);
    }
  };

  return (
    <Part title="Certificate">
      <p className="text-base">
        The roots, the value in them and its polynomial as one file.{' '}
        <code className="font-mono text-[0.94em]">verify-certificate</code> checks it without this
        program&rsquo;s engine.
      </p>
      <div className="mt-2">
        <Button aria-disabled={waiting} onClick={() => void (waiting || download())}>
          {waiting ? 'Being made …' : 'Save the certificate'}
        </Button>
      </div>
      <p role="status" className={`mt-1 text-small ${said?.fault ? 'text-ruddle' : 'text-soft'}`}>
        {said?.words}
      </p>
    </Part>
  );
}
