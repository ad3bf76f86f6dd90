import { createHash } from 'node:crypto';
import type { Knex } from 'knex';
import { database, inTransaction } from '@/db/client';
import {
  findAttachment,
  findAttachmentAnywhere,
  putAttachment,
  type Attachment,
} from '@/db/queries/attachments';
import { putWorkshop } from '@/db/queries/workshops';
import { Failure } from '@/lib/access';
import { LIMITS, countAgainst, readWorkshopSettings, type Logo, type Person } from '@/lib/accounts';
import { record } from '@/lib/activity';
import { openFor } from '@/lib/notebooks/guard';
import { holdWorkshop, openWorkshop } from './guard';
import { IMAGE_LIMITS, readImage } from './image';

const HASH = /^[0-9a-f]{64}$/;

/**
 * Puts a picture into the workshop's title blocks. Pictures of before stay stored, because issued
 * revisions show them for ever.
 * @throws Failure `invalid` for what is no PNG, JPEG or WebP picture or is too large a one, `too-many`
 */
export async function putLogo(person: Person, id: string, bytes: Buffer): Promise<Logo> {
  await openWorkshop(person, 'workshop.change', id);
  await countAgainst(LIMITS.logo, person.id);
  const facts = checkImage(bytes);
  const sha256 = createHash('sha256').update(bytes).digest('hex');
  const logo = { hash: sha256, width: facts.width, height: facts.height };
  await inTransaction((trx) =>
    setLogo(trx, person, id, logo, () =>
      putAttachment(trx, id, person.id, { ...facts, sha256, bytes }),
    ),
  );
  return logo;
}

/** Takes the picture out of the title blocks of today. */
export async function removeLogo(person: Person, id: string): Promise<void> {
  await inTransaction((trx) => setLogo(trx, person, id, null));
}

async function setLogo(
  trx: Knex.Transaction,
  person: Person,
  id: string,
  logo: Logo | null,
  store?: () => Promise<void>,
): Promise<void> {
  const { workshop } = await holdWorkshop(trx, person, 'workshop.change', id);
  await store?.();
  const settings = readWorkshopSettings(workshop.defaults);
  const defaults = { ...settings, titleBlock: { ...settings.titleBlock, logo } };
  await putWorkshop(trx, { id, name: workshop.name, defaults });
  await record(trx, {
    deed: 'workshop.changed',
    by: person.id,
    workshopId: id,
    subject: workshop.name,
    details: { parts: 'logo' },
  });
}

/** A picture of the workshop, for whoever belongs to it. @throws Failure `not-found` */
export async function readLogo(person: Person, id: string, hash: string): Promise<Attachment> {
  await openWorkshop(person, 'workshop.read', id);
  return found(HASH.test(hash) ? await findAttachment(database(), id, hash) : null);
}

/** The picture in the title block of a notebook, for whoever has a role on it. @throws Failure `not-found` */
export async function readNotebookLogo(
  person: Person,
  notebookId: string,
  hash: string,
): Promise<Attachment> {
  await openFor(person, 'notebook.read', notebookId);
  return logoByHash(hash);
}

/**
 * A picture by its hash alone, for a caller who was let through to a title block that shows it. It
 * is not looked up by workshop: a notebook that has moved shows its old revisions with the logo
 * they were issued under. The hash of a picture tells nothing to whoever has not seen the picture,
 * and whoever has it learns nothing new.
 * @throws Failure `not-found`
 */
export async function logoByHash(hash: string): Promise<Attachment> {
  return found(HASH.test(hash) ? await findAttachmentAnywhere(database(), hash) : null);
}

function found(attachment: Attachment | null): Attachment {
  if (attachment !== null) return attachment;
  throw new Failure('not-found', 'There is no such picture.');
}

function checkImage(bytes: Buffer) {
  const facts = readImage(bytes);
  if (facts === null) {
    throw new Failure('invalid', 'This is not a whole PNG, JPEG or WebP picture.');
  }
  const { width, height } = facts;
  if (Math.min(width, height) < 1 || Math.max(width, height) > IMAGE_LIMITS.side) {
    throw new Failure(
      'invalid',
      `The picture measures ${width} × ${height} pixels; at most ${IMAGE_LIMITS.side} a side are allowed.`,
    );
  }
  return facts;
}
