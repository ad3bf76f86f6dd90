import { readFile, readdir } from 'node:fs/promises';
import { join } from 'node:path';
import type { Knex } from 'knex';
import { simpleParser, type ParsedMail } from 'mailparser';

/** Files of the local mailbox that were read already, by name: none is ever changed. */
const read = new Map<string, ParsedMail>();

async function mailbox(): Promise<ParsedMail[]> {
  const folder = process.env.SURDWORK_MAILBOX;
  if (folder === undefined) return [];
  const names = (await readdir(folder)).filter((name) => name.endsWith('.eml')).sort();
  for (const name of names) {
    if (read.has(name)) continue;
    try {
      read.set(name, await simpleParser(await readFile(join(folder, name))));
    } catch {
      // Taken away by the mailbox meanwhile, as the oldest are.
    }
  }
  return names.flatMap((name) => read.get(name) ?? []);
}

const addressee = ({ to }: ParsedMail) => (Array.isArray(to) ? to[0] : to)?.value[0]?.address ?? '';

/** Letters to an address as they lie in the local mailbox, oldest first. */
export async function lettersTo(email: string): Promise<ParsedMail[]> {
  return (await mailbox()).filter((letter) => addressee(letter) === email);
}

/** Waits for so many letters to an address and gives the newest; the subject may choose among them. */
export async function letterTo(
  email: string,
  { subject = '', count = 1 }: { subject?: string; count?: number } = {},
): Promise<ParsedMail> {
  const end = Date.now() + 15_000;
  for (;;) {
    const letters = (await lettersTo(email)).filter((one) => one.subject?.includes(subject));
    const newest = letters.at(-1);
    if (newest !== undefined && letters.length >= count) return newest;
    if (Date.now() > end) {
      throw new Error(`${letters.length} letters to ${email}, expected ${count} “${subject}”.`);
    }
    await new Promise((resolve) => setTimeout(resolve, 40));
  }
}

/** The one address in a letter's text that stands on a line of its own. */
export function linkIn(text: string | undefined): string {
  const [link] = /^https?:\/\/\S+$/m.exec(text ?? '') ?? [];
  if (link === undefined) throw new Error(`No link in: ${text}`);
  return link;
}

/**
 * The address in the newest letter to somebody: from the queue where it still waits there, else from
 * the mailbox, where a served copy that shares the database has sent it.
 */
export async function newestLink(db: Knex, email: string, subject: string): Promise<string> {
  const row: { letter: string } | undefined = await db('outgoing_mail')
    .where({ recipient: email, subject, sent_at: null })
    .orderBy('queued_at', 'desc')
    .first('letter');
  const letter =
    row === undefined ? null : (JSON.parse(row.letter) as { action?: { url: string } });
  if (letter?.action !== undefined) return letter.action.url;
  return linkIn((await letterTo(email, { subject })).text);
}
