import type { OpenRevision } from '@/lib/notebooks/types';
import type { ExportedNotebook } from './notebook';

/** An issued revision as the writers take it; to a client it does not tell who issued it. */
export function exportedRevision(
  { notebook, version, revision, titleBlock, content }: OpenRevision,
  { forClient }: { forClient: boolean },
): ExportedNotebook {
  const { letter, purpose, note, issuedAt, issuedBy, checkedBy, checkCode, supersededBy } =
    revision;
  return {
    id: notebook.id,
    title: titleBlock.title,
    workshop: titleBlock.legalOwner,
    version: { number: version.number, author: titleBlock.creator, savedAt: version.savedAt },
    settings: content.settings,
    cells: content.cells,
    revision: {
      letter,
      purpose,
      note,
      issuedAt,
      ...(forClient ? {} : { issuedBy }),
      checkedBy,
      checkCode,
      supersededBy,
    },
    titleBlock,
  };
}
