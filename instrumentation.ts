import { startSending } from '@/lib/mail/worker';

/** Called once when a process of the server starts, and never by a build. */
export function register(): void {
  startSending();
}
