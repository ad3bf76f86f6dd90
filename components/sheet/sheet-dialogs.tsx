'use client';

import { lazy, Suspense } from 'react';
import type { NotebookHead } from '@/lib/notebooks/types';
import { KeepDialog } from './panels/keep-dialog';
import { SettingsDialog } from './panels/settings-dialog';
import { nextNumber, type NotebookOnScreen } from './state/use-notebook';

export type Panel = 'keep' | 'settings' | 'title-block' | 'people' | 'links' | 'issue' | 'conflict';

/** Loaded when first asked for. */
const LinksDialog = lazy(() => import('./panels/links-dialog'));
const IssueDialog = lazy(() => import('@/components/revisions/issue-dialog'));
const PeopleDialog = lazy(() => import('./panels/people-dialog'));
const TitleBlockDialog = lazy(() => import('./panels/title-block-dialog'));
const ConflictDialog = lazy(() => import('./panels/conflict-dialog'));

interface SheetDialogsProps {
  panel: Panel | null;
  notebook: NotebookHead;
  sheet: NotebookOnScreen;
  personId: string;
  mayShare: boolean;
  onPanel: (panel: Panel) => void;
  onClose: () => void;
}

export function SheetDialogs(props: SheetDialogsProps) {
  const { panel, notebook, sheet, mayShare, onPanel, onClose } = props;
  const { content, kept, save, saveState, dispatch } = sheet;

  switch (panel) {
    case 'keep':
      return (
        <KeepDialog
          next={nextNumber(sheet)}
          state={saveState}
          onClose={onClose}
          onKeep={(note) => {
            void save({ note }).then((end) => {
              if (end === 'saved') onClose();
              if (end === 'asked') onPanel('conflict');
            });
          }}
        />
      );
    case 'conflict':
      return sheet.questions === null ? null : (
        <Suspense>
          <ConflictDialog
            content={content}
            questions={sheet.questions}
            state={saveState}
            onAnswer={(sides) => {
              void sheet.answer(sides);
              onClose();
            }}
            onTakeTheirs={() => {
              sheet.putAside();
              onClose();
            }}
            onClose={onClose}
          />
        </Suspense>
      );
    case 'settings':
      return (
        <SettingsDialog
          settings={content.settings}
          onSet={(settings) => dispatch({ kind: 'set', settings })}
          onClose={onClose}
        />
      );
    case 'title-block':
      return (
        <Suspense>
          <TitleBlockDialog notebook={notebook} author={kept.savedBy} onClose={onClose} />
        </Suspense>
      );
    case 'people':
      return (
        <Suspense>
          <PeopleDialog
            notebookId={notebook.id}
            personId={props.personId}
            mayChange={mayShare}
            onClose={onClose}
          />
        </Suspense>
      );
    case 'links':
      return (
        <Suspense>
          <LinksDialog notebookId={notebook.id} onClose={onClose} />
        </Suspense>
      );
    case 'issue':
      return (
        <Suspense>
          <IssueDialog
            notebookId={notebook.id}
            head={kept.number}
            unkept={sheet.dirty}
            onClose={onClose}
          />
        </Suspense>
      );
    default:
      return null;
  }
}
