import { env } from '@/lib/env';

/** Whether mail goes to the local mailbox, because no SMTP server was named. */
export function hasLocalMailbox(): boolean {
  return env().SURDWORK_MAILBOX !== undefined;
}
