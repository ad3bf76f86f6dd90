import type { TitleField } from '@/components/drawing/title-block';
import { Moment } from '@/components/ui/moment';
import type { NotebookSettings } from '@/lib/notebooks/content';

export const ROUNDINGS: Record<NotebookSettings['rounding'], string> = {
  'half-even': 'nearest, ties to even',
  'half-up': 'nearest, ties up',
  up: 'always up',
  down: 'always down',
};

interface TitleFacts {
  workshop: string;
  title: string;
  /** The beginning of the notebook's id: enough to tell sheets apart by eye. */
  id: string;
  version: number;
  savedAt: string | null;
  savedBy?: string;
  settings: NotebookSettings;
}

/** The fields of the title block, after ISO 7200, with what a yard adds: unit, step, rounding. */
export function titleFields(facts: TitleFacts): TitleField[] {
  const { workshop, title, id, version, savedAt, savedBy, settings } = facts;
  return [
    { label: 'Legal owner', value: workshop, span: 4 },
    { label: 'Title', value: title, span: 8, strong: true },
    { label: 'Identification', value: id.slice(0, 8), span: 3 },
    ...(savedBy === undefined ? [] : [{ label: 'Created by', value: savedBy, span: 3 } as const]),
    {
      label: 'Date',
      value: savedAt === null ? 'not kept yet' : <Moment at={savedAt} dayOnly />,
      span: 3,
    },
    { label: 'Version', value: version === 0 ? 'none' : String(version), span: 3 },
    { label: 'Unit', value: settings.unit, span: 3 },
    { label: 'Cutting step', value: settings.step ?? 'none', span: 3 },
    { label: 'Rounding', value: ROUNDINGS[settings.rounding], span: savedBy === undefined ? 6 : 3 },
    ...(savedBy === undefined
      ? []
      : [{ label: 'Digits', value: String(settings.digits), span: 3 } as const]),
    { label: 'Caution', value: CAUTION, span: 12 },
  ];
}

export const CAUTION =
  'Exact numbers do not make a structure safe: structural design, lifting and handling follow local ' +
  'codes and licensed practice. Cut and try one piece before a batch.';
