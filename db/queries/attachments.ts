import type { Database } from '../client';

export interface Attachment {
  sha256: string;
  mediaType: string;
  width: number;
  height: number;
  bytes: Buffer;
}

interface AttachmentRow {
  sha256: string;
  media_type: string;
  width: number;
  height: number;
  bytes: Buffer;
}

/** Stores a file of a workshop; the same bytes a second time change nothing. */
export async function putAttachment(
  db: Database,
  workshopId: string,
  addedBy: string,
  { sha256, mediaType, width, height, bytes }: Attachment,
): Promise<void> {
  await db('attachments')
    .insert({
      workshop_id: workshopId,
      sha256,
      media_type: mediaType,
      width,
      height,
      bytes,
      added_by: addedBy,
    })
    .onConflict(['workshop_id', 'sha256'])
    .ignore();
}

export async function findAttachment(
  db: Database,
  workshopId: string,
  sha256: string,
): Promise<Attachment | null> {
  const row = (await db('attachments').where({ workshop_id: workshopId, sha256 }).first()) as
    AttachmentRow | undefined;
  return row === undefined ? null : toAttachment(row);
}

/** The same by its hash alone, for whoever was let through to what speaks of it. */
export async function findAttachmentAnywhere(
  db: Database,
  sha256: string,
): Promise<Attachment | null> {
  const row = (await db('attachments').where({ sha256 }).first()) as AttachmentRow | undefined;
  return row === undefined ? null : toAttachment(row);
}

const toAttachment = (row: AttachmentRow): Attachment => ({
  sha256: row.sha256,
  mediaType: row.media_type,
  width: row.width,
  height: row.height,
  bytes: row.bytes,
});
