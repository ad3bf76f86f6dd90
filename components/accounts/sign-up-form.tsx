'use client';

import { signIn } from 'next-auth/react';
import { useState } from 'react';
import { ask, Refusal, sayFault } from '@/components/ui/ask';
import { Button } from '@/components/ui/button';
import { Field } from '@/components/ui/field';
import { Notice } from '@/components/ui/notice';

const FIELDS = [
  { name: 'name', label: 'Your name', autoComplete: 'name', type: 'text', hint: undefined },
  {
    name: 'workshop',
    label: 'Workshop',
    autoComplete: 'organization',
    type: 'text',
    hint: 'The yard or office your notebooks belong to; it stands in their title blocks.',
  },
  {
    name: 'email',
    label: 'E-mail address',
    autoComplete: 'username',
    type: 'email',
    hint: undefined,
  },
  {
    name: 'password',
    label: 'Password',
    autoComplete: 'new-password',
    type: 'password',
    hint: 'At least 12 characters; a few plain words are good.',
  },
] as const;

type Values = Record<(typeof FIELDS)[number]['name'], string>;

/** The faults of single fields, as the problem document lists them. */
export function fieldFaults(refusal: Refusal): Partial<Record<string, string>> {
  const { fields } = refusal.document;
  if (!Array.isArray(fields)) return {};
  return Object.fromEntries(
    fields.map((fault: { field: string; message: string }) => [fault.field, fault.message]),
  );
}

export function SignUpForm() {
  const [values, setValues] = useState<Values>({ name: '', workshop: '', email: '', password: '' });
  const [faults, setFaults] = useState<Partial<Record<string, string>>>({});
  const [fault, setFault] = useState<string | null>(null);
  const [busy, setBusy] = useState(false);

  const submit = async () => {
    setBusy(true);
    setFault(null);
    setFaults({});
    try {
      await ask('/api/accounts', { body: values });
      await signIn('credentials', {
        email: values.email,
        password: values.password,
        redirect: false,
      });
      window.location.assign('/notebooks');
    } catch (refused) {
      const placed = refused instanceof Refusal ? fieldFaults(refused) : {};
      setFaults(placed);
      if (Object.keys(placed).length === 0) setFault(sayFault(refused));
      setBusy(false);
    }
  };

  return (
    <form
      className="space-y-4"
      method="post"
      onSubmit={(event) => {
        event.preventDefault();
        void submit();
      }}
    >
      {fault && <Notice tone="fault">{fault}</Notice>}
      {FIELDS.map((field) => (
        <Field
          key={field.name}
          {...field}
          required
          value={values[field.name]}
          fault={faults[field.name] ?? null}
          onChange={(event) => setValues({ ...values, [field.name]: event.target.value })}
        />
      ))}
      <Button type="submit" look="main" className="w-full" disabled={busy}>
        {busy ? 'Making the account…' : 'Make an account'}
      </Button>
    </form>
  );
}
