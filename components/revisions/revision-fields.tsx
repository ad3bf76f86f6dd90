import type { TitleField } from '@/components/drawing/title-block';
import { titleFields } from '@/components/sheet/title-fields';
import type { OpenRevision } from '@/lib/notebooks/types';

/**
 * The title block of an issued revision, as it was frozen: that of every sheet, and what issuing adds.
 * It stands at the foot of every printed page, and a browser repeats what keeps its place free only
 * while that is lower than a quarter of the page: so the rows are few and full.
 */
export function revisionFields(issued: OpenRevision, logoAt: string): TitleField[] {
  const { revision, titleBlock, content, version } = issued;
  const fields = titleFields({
    block: titleBlock,
    settings: content.settings,
    version: version.number,
    savedAt: version.savedAt,
    revision: { index: revision.letter, issuedAt: revision.issuedAt },
    logoAt,
  });
  const of = (label: string, more: Partial<TitleField> = {}): TitleField[] =>
    fields.filter((field) => field.label === label).map((field) => ({ ...field, ...more }));
  const { letter, supersededBy: by } = revision;
  const standing = by === null ? letter : `${letter}, superseded by ${by}`;
  return [
    ...of('Legal owner'),
    ...of('Title'),
    ...of('Supplementary title', { span: 8 }),
    { label: 'Purpose', value: revision.purpose, span: 4 },
    ...of('Identification number', { span: 3 }),
    { label: 'Revision', value: standing, span: by === null ? 2 : 4, strong: true },
    ...of('Date of issue', { span: 2 }),
    { label: 'Check code', value: revision.checkCode, span: 3 },
    ...of('Created by'),
    { label: 'Checked by', value: revision.checkedBy ?? 'nobody named', span: 3 },
    ...of('Approved by'),
    ...of('Version', { label: 'From version' }),
    ...of('Unit'),
    ...of('Cutting step', { span: 2 }),
    ...of('Rounding', { span: 3 }),
    ...of('General tolerances'),
    ...of('Sheet'),
    ...of('Caution'),
  ];
}
