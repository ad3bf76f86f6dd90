import type { TitleField } from '@/components/drawing/title-block';
import { titleFields } from '@/components/sheet/title-fields';
import type { OpenRevision } from '@/lib/notebooks/types';

/** The title block of an issued revision, as it was frozen: that of every sheet, and what issuing adds. */
export function revisionFields(issued: OpenRevision, logoAt: string): TitleField[] {
  const { revision, titleBlock, content, version } = issued;
  const fields = titleFields({
    block: titleBlock,
    settings: content.settings,
    version: version.number,
    savedAt: version.savedAt,
    revision: { index: revision.letter, issuedAt: revision.issuedAt },
    logoAt,
  }).map((field) => (field.label === 'Revision' ? { ...field, strong: true } : field));
  const issue: TitleField[] = [
    { label: 'Checked by', value: revision.checkedBy ?? 'nobody named', span: 3 },
    { label: 'Purpose', value: revision.purpose, span: 4 },
    { label: 'Check code', value: revision.checkCode, span: 3 },
  ];
  const created = fields.findIndex(({ label }) => label === 'Created by') + 1;
  return [
    ...supersededField(revision.supersededBy),
    ...fields.slice(0, created),
    ...issue,
    ...fields.slice(created),
  ];
}

function supersededField(by: string | null): TitleField[] {
  if (by === null) return [];
  const value = `Superseded by revision ${by}: do not work from this sheet`;
  return [{ label: 'Standing', value, span: 12, strong: true }];
}
