import { database, type Database } from '@/db/client';
import {
  claimMail,
  giveMailUp,
  markMailSent,
  postponeMail,
  pruneMail,
  type ClaimedMail,
} from '@/db/queries/outgoing-mail';
import { env } from '@/lib/env';
import { MOST_ATTEMPTS, waitAfter } from './back-off';
import { Letter } from './letter';
import { takePlaceOfSender } from './poke';
import { smtpTransport, transportSettings, type Transport } from './transport';

/** How long one instance has a letter to itself; longer than any attempt may take. */
const LEASE_SECONDS = 300;
/** Letters sent side by side. */
const LANES = 3;
const POLL_MS = 1000;
const PRUNE_EVERY_MS = 3600 * 1000;
/** Who was written to, and when, is kept for so long; the letter itself is gone once it is sent. */
const KEEP_DAYS = 30;

/**
 * Sends every letter that is due. A letter is claimed before it is sent, so instances that share a
 * database never send one twice; one whose sender vanished is sent again when its lease is over, under
 * the same Message-ID.
 * @returns how many were sent
 */
export async function sendDue(
  db: Database,
  transport: Transport,
  lease = LEASE_SECONDS,
): Promise<number> {
  const lane = async () => {
    let sent = 0;
    for (;;) {
      const mail = await claimMail(db, lease);
      if (mail === null) return sent;
      if (await attempt(db, transport, mail)) sent += 1;
    }
  };
  const counts = await Promise.all(Array.from({ length: LANES }, lane));
  return counts.reduce((sum, count) => sum + count, 0);
}

async function attempt(db: Database, transport: Transport, mail: ClaimedMail): Promise<boolean> {
  const letter = Letter.safeParse(mail.letter);
  if (!letter.success) {
    await giveMailUp(db, mail, 'the letter is not readable');
    return false;
  }
  try {
    await transport.send(letter.data, mail.id);
  } catch (error) {
    await fail(db, mail, error);
    return false;
  }
  await markMailSent(db, mail);
  return true;
}

async function fail(db: Database, mail: ClaimedMail, error: unknown): Promise<void> {
  const { reason, final } = readFault(error);
  const wait = final ? null : waitAfter(mail.attempts);
  console.error(
    JSON.stringify({ fault: 'mail', mail: mail.id, attempt: mail.attempts, wait, reason }),
  );
  if (wait !== null) return postponeMail(db, mail, wait, reason);
  const why = final ? 'refused for good' : `given up after ${MOST_ATTEMPTS} attempts`;
  return giveMailUp(db, mail, `${why}: ${reason}`);
}

/**
 * Why an attempt failed, in the codes of the library and the server: their sentences quote addresses.
 * An answer 5xx to sender or recipient is final (RFC 5321, section 4.2.1); a refused password is
 * not, because whoever runs the copy can mend it.
 */
function readFault(error: unknown): { reason: string; final: boolean } {
  const { code, responseCode } = (error ?? {}) as { code?: unknown; responseCode?: unknown };
  const named = typeof code === 'string' && /^[A-Z_]{2,40}$/.test(code) ? code : 'fault';
  const answered = typeof responseCode === 'number' ? responseCode : null;
  return {
    reason: answered === null ? named : `${named} ${answered}`,
    final: named === 'EENVELOPE' && answered !== null && answered >= 500,
  };
}

/** Time for the transaction that queued a letter to end. */
const SOON_MS = 40;

/**
 * Starts sending, once in each process of the server. It looks for due letters every second, which
 * is one question to an index, and sooner when it is poked.
 */
export function startSending(): void {
  const settings = transportSettings(env());
  if (settings === null) return;
  let timer: NodeJS.Timeout | null = null;
  let busy = false;
  let prunedAt = 0;
  const schedule = (ms: number) => {
    if (timer !== null) clearTimeout(timer);
    timer = setTimeout(() => void work(), ms);
    timer.unref();
  };
  const first = takePlaceOfSender({
    poke: () => {
      if (!busy) schedule(SOON_MS);
    },
  });
  if (!first) return;
  const transport = smtpTransport(settings);
  const work = async () => {
    busy = true;
    try {
      await sendDue(database(), transport);
      if (Date.now() - prunedAt > PRUNE_EVERY_MS) {
        prunedAt = Date.now();
        await pruneMail(database(), KEEP_DAYS);
      }
    } catch (error) {
      const code = (error as { code?: unknown } | null)?.code;
      console.error(JSON.stringify({ fault: 'mail queue', code: String(code) }));
    }
    busy = false;
    schedule(POLL_MS);
  };
  schedule(POLL_MS);
}
