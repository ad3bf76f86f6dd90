'use client';

import Link from 'next/link';
import type { NotebookHead, Now } from '@/lib/notebooks/types';
import { Button, LinkButton } from '@/components/ui/button';
import { Disclosure, DISCLOSURE_ROW } from '@/components/ui/disclosure';
import { CommentsButton } from './comments/comments-button';
import { PeopleHere } from './people-here';
import { saveWords } from './save-words';
import type { Panel } from './sheet-dialogs';
import type { Evaluation } from './state/use-evaluation';
import { nextNumber, type NotebookOnScreen } from './state/use-notebook';

interface SheetBarProps {
  notebook: NotebookHead;
  sheet: NotebookOnScreen;
  evaluation: Evaluation;
  /** The others who have it on the screen. */
  people: Now['people'];
  mayWrite: boolean;
  mayShare: boolean;
  onPanel: (panel: Panel) => void;
  onFind: () => void;
  onKeys: () => void;
  /** Shows the index of marks where it does not stand beside the sheet. */
  onMarks: () => void;
}

export const MARKS_BUTTON = 'sheet-marks';

const STATES = {
  settled: '',
  pending: 'working out…',
  slow: 'still working out; the figures shown are the last ones',
  failed: 'no answer; the figures shown are the last ones',
} as const;

const EXPORTS = { json: 'Results as JSON', tex: 'Sheet as TeX', csv: 'Marks as CSV' } as const;

/** Above the sheet: which one it is, whether it is kept, and what can be done with it as a whole. */
export function SheetBar(props: SheetBarProps) {
  const { notebook, sheet, evaluation, people, mayWrite, mayShare } = props;
  const { onPanel, onFind, onKeys, onMarks } = props;
  return (
    <div className="flex flex-wrap items-end justify-between gap-x-6 gap-y-2 print:hidden">
      <div className="min-w-0">
        <p className="text-small text-soft">
          <Link href="/notebooks" className="underline-offset-4 hover:underline">
            {notebook.workshop.name}
          </Link>
        </p>
        <h1 className="font-serif text-head font-semibold [overflow-wrap:anywhere]">
          {notebook.title}
        </h1>
        <p className="text-small text-soft">
          <span role="status" className={sheet.dirty ? 'font-semibold text-ochre' : ''}>
            {saveWords(sheet)}
          </span>
          {sheet.dirty &&
            (sheet.storeFull
              ? ' · not kept on this computer: save soon'
              : ' · kept on this computer until saved')}
          {STATES[evaluation.state] && ` · ${STATES[evaluation.state]}`}
        </p>
      </div>
      <div className="flex flex-wrap items-center gap-2 print:hidden">
        <PeopleHere people={people} content={sheet.content} />
        <Button id={MARKS_BUTTON} className="lg:hidden" onClick={onMarks}>
          Marks
        </Button>
        {mayWrite && (
          <>
            <Button onClick={sheet.undo ?? undefined} disabled={sheet.undo === null}>
              Undo
            </Button>
            <Button onClick={sheet.redo ?? undefined} disabled={sheet.redo === null}>
              Redo
            </Button>
            <Button onClick={() => onPanel('settings')}>Unit and step</Button>
            <Button onClick={() => onPanel('title-block')}>Title block</Button>
          </>
        )}
        <Button onClick={onFind}>Find</Button>
        <Button onClick={onKeys}>Keys</Button>
        <CommentsButton />
        <LinkButton href={`/notebooks/${notebook.id}/versions`}>Versions</LinkButton>
        <LinkButton href={`/notebooks/${notebook.id}/revisions`}>Revisions</LinkButton>
        <Disclosure
          label="Hand over"
          className="inline-flex min-h-9 items-center rounded-cut border border-rule bg-sheet px-3 text-small font-medium hover:border-ink"
        >
          {(['people', 'links'] as const)
            .filter((panel) => panel === 'people' || mayShare)
            .map((panel) => (
              <button
                key={panel}
                type="button"
                className={DISCLOSURE_ROW}
                onClick={() => onPanel(panel)}
              >
                {panel === 'people' ? 'People on this notebook' : 'Client links'}
              </button>
            ))}
          {notebook.mayIssue && (
            <button type="button" className={DISCLOSURE_ROW} onClick={() => onPanel('issue')}>
              Issue a revision
              <span className="text-soft">version {sheet.kept.number}</span>
            </button>
          )}
          {(['json', 'tex', 'csv'] as const).map((format) => (
            <a
              key={format}
              download
              href={`/api/notebooks/${notebook.id}/export?format=${format}`}
              className={DISCLOSURE_ROW}
            >
              {EXPORTS[format]}
              <span className="text-soft">version {sheet.kept.number}</span>
            </a>
          ))}
        </Disclosure>
        {mayWrite && (
          <Button
            look="main"
            disabled={!sheet.dirty && sheet.kept.byItself !== true}
            onClick={() => onPanel('keep')}
          >
            Keep version {nextNumber(sheet)}
          </Button>
        )}
      </div>
    </div>
  );
}
