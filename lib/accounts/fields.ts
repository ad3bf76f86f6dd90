import { z } from 'zod';
import { normaliseEmail } from '@/db/queries/users';
import { PASSWORD_LENGTH } from './passwords';

/** A one-line name: trimmed, not empty, without control characters and lone surrogates. */
export const oneLine = (what: string, max: number) =>
  z
    .string({ error: `${what} is missing.` })
    .trim()
    .min(1, { error: `${what} is empty.` })
    .max(max, { error: `${what} is longer than ${max} characters.` })
    .regex(/^[^\p{Cc}\p{Cs}]*$/u, { error: `${what} contains characters that cannot be printed.` });

export const EmailAddress = z
  .string({ error: 'The e-mail address is missing.' })
  .trim()
  .max(254, { error: 'The e-mail address is longer than 254 characters.' })
  .pipe(z.email({ error: 'This is not an e-mail address; it should look like name@example.org.' }))
  .transform(normaliseEmail);

export const Password = z
  .string({ error: 'The password is missing.' })
  .min(PASSWORD_LENGTH.min, {
    error: `The password has fewer than ${PASSWORD_LENGTH.min} characters.`,
  })
  .max(PASSWORD_LENGTH.max, {
    error: `The password has more than ${PASSWORD_LENGTH.max} characters.`,
  });
