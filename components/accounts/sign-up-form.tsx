'use client';

import { signIn } from 'next-auth/react';
import { useState } from 'react';
import { ask } from '@/components/ui/ask';
import { Button } from '@/components/ui/button';
import { Field } from '@/components/ui/field';
import { Notice } from '@/components/ui/notice';
import { LookIntoMail } from './look-into-mail';
import { useAsking } from './use-asking';

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
    hint: 'A letter goes there, with a link that makes the account.',
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

const NAMES = FIELDS.map(({ name }) => name);

export function SignUpForm({ localMail }: { localMail: boolean }) {
  const [values, setValues] = useState<Values>({ name: '', workshop: '', email: '', password: '' });
  const [waits, setWaits] = useState(false);
  const { busy, fault, faults, run } = useAsking(NAMES);
  const { email, password } = values;

  const submit = () =>
    run(async () => {
      const { confirmed } = await ask<{ confirmed: boolean }>('/api/accounts', { body: values });
      if (!confirmed) return setWaits(true);
      await signIn('credentials', { email, password, redirect: false });
      window.location.assign('/notebooks');
    });

  if (waits) return <LookIntoMail email={email.trim()} password={password} localMail={localMail} />;
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
