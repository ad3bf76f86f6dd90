'use client';

import { lazy, Suspense, useState } from 'react';
import type { NotebookHead } from '@/lib/notebooks/types';
import { ConflictDialog } from './panels/conflict-dialog';
import { KeepDialog } from './panels/keep-dialog';
import { SettingsDialog } from './panels/settings-dialog';
import type { NotebookOnScreen } from './state/use-notebook';

export type Panel = 'keep' | 'settings' | 'title-block' | 'people' | 'links' | 'issue' | 'conflict';

/** Loaded when first asked for. */
const LinksDialog = lazy(() => import('./panels/links-dialog'));
const IssueDialog = lazy(() => import('@/components/revisions/issue-dialog'));
const PeopleDialog = lazy(() => import('./panels/people-dialog'));
const TitleBlockDialog = lazy(() => import('./panels/title-block-dialog'));

interface SheetDialogsProps {
  panel: Panel | null;
  notebook: NotebookHead;
  sheet: NotebookOnScreen;
  personId: string;
  personName: string;
  mayShare: boolean;
  onClose: () => void;
}

export function SheetDialogs(props: SheetDialogsProps) {
  const { panel, notebook, sheet, personName, mayShare, onClose } = props;
  const { content, conflict, kept, keep, keepState, dispatch } = sheet;
  const [later, setLater] = useState<typeof conflict>(null);

  // A conflict opens by itself, once; whoever closes it finds it again in the news above the sheet.
  if (conflict && (panel === 'conflict' || conflict !== later)) {
    const close = () => {
      setLater(conflict);
      onClose();
    };
    return (
      <ConflictDialog
        base={kept.content}
        mine={content}
        head={conflict}
        state={keepState}
        onClose={close}
        onKeep={(together) => {
          dispatch({ kind: 'replace', content: together });
          void keep(
            together,
            conflict.number,
            `brought together with version ${conflict.number}`,
            personName,
          ).then((done) => {
            if (done) close();
          });
        }}
        onTakeTheirs={() => {
          const { number, content: theirs, savedAt, author } = conflict;
          sheet.putAside({ number, content: theirs, savedAt, savedBy: author });
          close();
        }}
      />
    );
  }
  switch (panel) {
    case 'keep':
      return (
        <KeepDialog
          next={kept.number + 1}
          state={keepState}
          onClose={onClose}
          onKeep={(note) => {
            void keep(content, kept.number, note, personName).then((done) => {
              if (done) onClose();
            });
          }}
        />
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
