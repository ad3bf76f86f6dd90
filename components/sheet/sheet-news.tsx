'use client';

import { Button } from '@/components/ui/button';
import { Moment } from '@/components/ui/moment';
import { Notice } from '@/components/ui/notice';
import type { Panel } from './sheet-dialogs';
import type { Evaluation } from './state/use-evaluation';
import type { NotebookOnScreen } from './state/use-notebook';

interface SheetNewsProps {
  sheet: NotebookOnScreen;
  evaluation: Evaluation;
  archived: boolean;
  onPanel: (panel: Panel) => void;
}

/** What whoever writes should know now: a draft found, one put aside, a conflict, a lost connection. */
export function SheetNews({ sheet, evaluation, archived, onPanel }: SheetNewsProps) {
  const { found, aside, conflict, keepState, storeFull } = sheet;
  return (
    <div className="space-y-2 empty:hidden print:hidden">
      {archived && (
        <Notice tone="caution">This notebook is archived: it can be read, but not changed.</Notice>
      )}
      {evaluation.state === 'failed' && <Notice tone="caution">{evaluation.fault}</Notice>}
      {storeFull && (
        <Notice tone="caution">
          This browser has no room for a draft, so what you type is safe only once it is kept.
        </Notice>
      )}
      {conflict && (
        <Notice tone="caution">
          {conflict.author} kept version {conflict.number} since you began.{' '}
          <Button look="quiet" onClick={() => onPanel('conflict')}>
            Compare and choose
          </Button>
        </Notice>
      )}
      {found && !conflict && (
        <Notice>
          What you typed here until <Moment at={found.at} /> had not been kept; it is on the sheet
          again.{' '}
          <Button look="quiet" onClick={sheet.forgetFound}>
            Go on with it
          </Button>
          <Button look="quiet" onClick={() => sheet.putAside(sheet.kept)}>
            Put it aside
          </Button>
        </Notice>
      )}
      {aside && (
        <Notice>
          A text of yours of <Moment at={aside.at} /> is put aside in this browser.{' '}
          <Button look="quiet" onClick={sheet.bringBack}>
            Bring it back onto the sheet
          </Button>
        </Notice>
      )}
      {keepState.kind === 'failed' && (
        <Notice tone="fault">Nothing was kept: {keepState.fault} Your text is still here.</Notice>
      )}
    </div>
  );
}
