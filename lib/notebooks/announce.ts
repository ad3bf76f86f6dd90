import type { Database } from '@/db/client';
import { listClientLinks, type ClientLink } from '@/db/queries/client-links';
import { queueLetter, type Letter } from '@/lib/mail';
import { addressOfLink } from './link-tokens';

/** What a new revision is, in the words of the letter about it. */
interface News {
  notebookId: string;
  ordinal: number;
  letter: string;
  /** Letter of the one before; null for the first. */
  replaces: string | null;
  title: string;
  legalOwner: string;
  purpose: string;
  note: string | null;
}

interface Told extends ClientLink {
  clientEmail: string;
}

/** The links whose clients are told of a new revision: in use, for the latest one, with an address. */
export async function linksToTell(db: Database, notebookId: string): Promise<Told[]> {
  const now = Date.now();
  const isTold = (link: ClientLink): link is Told =>
    link.clientEmail !== null &&
    link.revokedAt === null &&
    link.revision === null &&
    (link.expiresAt === null || link.expiresAt.getTime() > now);
  return (await listClientLinks(db, notebookId)).filter(isTold);
}

/** Queues a letter to every client who is to hear of it, once for each revision and link; says how many. */
export async function announceRevision(db: Database, news: News): Promise<number> {
  const links = await linksToTell(db, news.notebookId);
  for (const link of links) {
    await queueLetter(db, letterTo(link, news), `revision:${link.id}:${news.ordinal}`);
  }
  return links.length;
}

function letterTo(link: Told, news: News): Letter {
  const { letter, replaces, title, legalOwner, purpose, note } = news;
  const url = addressOfLink(link);
  const replaced =
    replaces === null
      ? 'It is the first one that was issued.'
      : `It replaces revision ${replaces}: please do not work from revision ${replaces} any more.`;
  const address = 'Open it at the address that you were given before.';
  return {
    to: link.clientEmail,
    ...(link.clientName === null ? {} : { name: link.clientName }),
    subject: `Revision ${letter} of ${title}`.slice(0, 300),
    paragraphs: [
      `${legalOwner} has issued revision ${letter} of “${title}”. Its purpose: ${purpose}.`,
      ...(note === null ? [] : [`What is new, in the words of ${legalOwner}: ${note}`]),
      replaced,
      ...(url === null ? [address] : []),
      ...(link.passphraseHash === null
        ? []
        : ['You will be asked for the passphrase of the link.']),
    ],
    ...(url === null ? {} : { action: { label: `Read revision ${letter}`, url } }),
    reason: `You get this letter because ${legalOwner} gave you a client link to this sheet.`,
  };
}
