import { readFile, readdir } from 'node:fs/promises';
import { join } from 'node:path';
import { simpleParser } from 'mailparser';
import { env } from '@/lib/env';

/** A letter in the local mailbox. */
export interface LocalMail {
  /** Name of its file without the ending; sorts by time. */
  id: string;
  to: string;
  subject: string;
  /** When it was handed in, ISO 8601. */
  at: string;
  text: string;
  html: string;
}

const ID = /^\d{8}T\d{9}Z-[0-9a-f]{8}$/;
const SHOWN = 200;

/** The letters in the local mailbox, newest first; none where there is no such mailbox. */
export async function listLocalMail(): Promise<LocalMail[]> {
  const folder = env().SURDWORK_MAILBOX;
  if (folder === undefined) return [];
  const names = await readdir(folder);
  const ids = names
    .filter((name) => name.endsWith('.eml'))
    .map((name) => name.slice(0, -4))
    .filter((id) => ID.test(id))
    .sort()
    .reverse()
    .slice(0, SHOWN);
  const letters = await Promise.all(ids.map(findLocalMail));
  return letters.filter((letter) => letter !== null);
}

/** One of them; null for whatever is not there. */
export async function findLocalMail(id: string): Promise<LocalMail | null> {
  const folder = env().SURDWORK_MAILBOX;
  if (folder === undefined || !ID.test(id)) return null;
  let raw: Buffer;
  try {
    raw = await readFile(join(folder, `${id}.eml`));
  } catch {
    return null;
  }
  const parsed = await simpleParser(raw, { skipTextToHtml: true, skipHtmlToText: true });
  const to = Array.isArray(parsed.to) ? parsed.to : [parsed.to];
  const written = to.flatMap((one) => one?.value ?? []);
  return {
    id,
    to: written
      .map(({ name, address = '' }) => (name === '' ? address : `${name} <${address}>`))
      .join(', '),
    subject: parsed.subject ?? '',
    at: momentOf(id),
    text: parsed.text ?? '',
    html: typeof parsed.html === 'string' ? parsed.html : '',
  };
}

/** `20260301T101530123Z-…` is 2026-03-01T10:15:30.123Z. */
function momentOf(id: string): string {
  return id.replace(/^(\d{4})(\d\d)(\d\d)T(\d\d)(\d\d)(\d\d)(\d{3})Z.*$/, '$1-$2-$3T$4:$5:$6.$7Z');
}
