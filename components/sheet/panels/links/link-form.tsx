'use client';

import { useState, type FormEvent } from 'react';
import useSWR from 'swr';
import type { RevisionLine } from '@/lib/notebooks/types';
import { askFor } from '@/components/ui/ask';
import { Button } from '@/components/ui/button';
import { Choice, Field } from '@/components/ui/field';

/** What a link is asked to be; what is left out is not set. */
export type LinkWish = Partial<
  Record<'label' | 'revision' | 'lastDay' | 'passphrase' | 'clientName' | 'clientEmail', string>
>;

interface LinkFormProps {
  notebookId: string;
  /** Whether it was made. */
  onMake: (wish: LinkWish) => Promise<boolean>;
}

/** Who the link is for, and, where one wants more, what it shows and how long. */
export function LinkForm({ notebookId, onMake }: LinkFormProps) {
  const { data } = useSWR<{ revisions: RevisionLine[] }>(
    `/api/notebooks/${notebookId}/revisions`,
    askFor,
  );
  const [busy, setBusy] = useState(false);

  const submit = async (event: FormEvent<HTMLFormElement>) => {
    event.preventDefault();
    const form = event.currentTarget;
    const filled = [...new FormData(form)].flatMap(([name, value]) =>
      typeof value === 'string' && value.trim() !== '' ? [[name, value.trim()] as const] : [],
    );
    setBusy(true);
    // What was typed stays when the link is refused.
    if (await onMake(Object.fromEntries(filled))) form.reset();
    setBusy(false);
  };

  return (
    <form
      className="space-y-3 border border-hairline p-3"
      onSubmit={(event) => void submit(event)}
      autoComplete="off"
    >
      <div className="grid gap-3 sm:grid-cols-2">
        <Field label="For whom" name="label" placeholder="The architect" maxLength={120} />
        <Choice label="Shows" name="revision">
          <option value="">the latest revision, always</option>
          {data?.revisions.map(({ letter, purpose }) => (
            <option key={letter} value={letter}>
              {`only revision ${letter}, ${purpose}`}
            </option>
          ))}
        </Choice>
      </div>
      <details>
        <summary className="text-small font-medium text-snapline">
          Letters, last day, passphrase
        </summary>
        <div className="mt-3 grid gap-3 sm:grid-cols-2">
          <Field label="Client’s name" name="clientName" maxLength={120} />
          <Field
            label="Client’s e-mail"
            name="clientEmail"
            type="email"
            maxLength={254}
            hint="Gets a letter when a new revision is issued."
          />
          <Field
            label="Last day"
            name="lastDay"
            type="date"
            hint="It opens to the end of it, UTC."
          />
          <Field
            label="Passphrase"
            name="passphrase"
            minLength={8}
            maxLength={200}
            hint="Tell it apart from the link."
          />
        </div>
      </details>
      <div className="flex justify-end">
        <Button type="submit" look="main" disabled={busy}>
          {busy ? 'Making…' : 'Make a link'}
        </Button>
      </div>
    </form>
  );
}
