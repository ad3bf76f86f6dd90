/**
 * Called once when a process of the server starts, and never by a build. Next also builds this file
 * for a runtime without Node's modules; the name of the runtime is filled in at the build, so nothing
 * of the sender gets in there.
 */
export async function register(): Promise<void> {
  if (process.env.NEXT_RUNTIME !== 'nodejs') return;
  const { startSending } = await import('@/lib/mail/worker');
  startSending();
}
