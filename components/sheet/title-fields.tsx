import type { TitleField } from '@/components/drawing/title-block';
import { LegalOwner } from '@/components/drawing/legal-owner';
import { Moment } from '@/components/ui/moment';
import type { NotebookSettings } from '@/lib/notebooks/content';
import type { NotebookHead, TitleBlock } from '@/lib/notebooks/types';

export const ROUNDINGS: Record<NotebookSettings['rounding'], string> = {
  'half-even': 'nearest, ties to even',
  'half-up': 'nearest, ties up',
  up: 'always up',
  down: 'always down',
};

interface TitleFacts {
  block: TitleBlock;
  settings: NotebookSettings;
  version: number;
  /** When the version was kept; null while nothing has been kept. */
  savedAt: string | null;
  /** Of an issued revision: its letter, and when it was issued. */
  revision?: { index: string; issuedAt: string };
  /** Where logos are found, the file's hash left out, such as `/api/notebooks/…/logo`. */
  logoAt: string;
}

/**
 * The fields of the title block, after ISO 7200, with what a yard adds: unit, step, rounding. What
 * nobody filled in is left out.
 */
export function titleFields(facts: TitleFacts): TitleField[] {
  const { block, settings, version, savedAt, revision, logoAt } = facts;
  const date = revision?.issuedAt ?? savedAt;
  const fields: TitleField[] = [
    {
      label: 'Legal owner',
      value: <LegalOwner name={block.legalOwner} logo={block.logo} logoAt={logoAt} />,
      span: 4,
    },
    { label: 'Title', value: block.title, span: 8, strong: true },
    { label: 'Supplementary title', value: block.supplementaryTitle, span: 12 },
    { label: 'Identification number', value: block.identificationNumber, span: 4 },
    { label: 'Sheet', value: block.sheet, span: 2 },
    ...(revision === undefined
      ? []
      : [{ label: 'Revision', value: revision.index, span: 2 } as const]),
    { label: 'Version', value: version === 0 ? 'none' : String(version), span: 2 },
    {
      label: revision === undefined ? 'Date' : 'Date of issue',
      value: date === null ? 'not kept yet' : <Moment at={date} dayOnly />,
      span: 3,
    },
    { label: 'Created by', value: block.creator, span: 3 },
    { label: 'Approved by', value: block.approvalPerson, span: 3 },
    {
      label: 'General tolerances',
      value: block.toleranceClass === null ? '' : `ISO 2768-1, class ${block.toleranceClass}`,
      span: 3,
    },
    { label: 'Unit', value: settings.unit, span: 2 },
    { label: 'Cutting step', value: settings.step ?? 'none', span: 2 },
    { label: 'Rounding', value: ROUNDINGS[settings.rounding], span: 3 },
    { label: 'Digits', value: String(settings.digits), span: 2 },
    { label: 'Caution', value: CAUTION, span: 12 },
  ];
  return fields.filter(({ value }) => value !== '');
}

/** The notebook's title block over a version that somebody else may have kept. */
export function blockOf(head: NotebookHead, author: string): TitleBlock {
  return { ...head.titleBlock, creator: head.titleEntries.creator || author };
}

export const CAUTION =
  'Exact numbers do not make a structure safe: structural design, lifting and handling follow local ' +
  'codes and licensed practice. Cut and try one piece before a batch.';
