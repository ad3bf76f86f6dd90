'use client';

import { BringBack } from '@/components/notebooks/bring-back';
import { Button } from '@/components/ui/button';
import { Moment } from '@/components/ui/moment';
import { Notice } from '@/components/ui/notice';
import type { Panel } from './sheet-dialogs';
import { useConnection } from './state/use-connection';
import type { Evaluation } from './state/use-evaluation';
import type { NotebookOnScreen } from './state/use-notebook';

interface SheetNewsProps {
  sheet: NotebookOnScreen;
  evaluation: Evaluation;
  archived: boolean;
  /** The id of the notebook, for an owner, who may bring it back. */
  bringBack: string | null;
  onPanel: (panel: Panel) => void;
}

/** What whoever writes should know now: a draft found, one put aside, a conflict, a lost connection. */
export function SheetNews({ sheet, evaluation, archived, bringBack, onPanel }: SheetNewsProps) {
  const connection = useConnection();
  const { found, aside, questions, saveState, storeFull, elsewhere } = sheet;
  return (
    <div className="space-y-2 empty:hidden print:hidden">
      {archived && (
        <Notice tone="caution">
          This notebook is archived: it can be read, but not changed.{' '}
          {bringBack !== null && <BringBack notebookId={bringBack} />}
        </Notice>
      )}
      {connection === 'lost' ? (
        <Notice tone="caution" title="The connection is lost">
          The figures shown are the last ones.
          {sheet.dirty &&
            ` What you typed is ${storeFull ? 'on this page only' : 'kept on this computer'} until it can be saved.`}
        </Notice>
      ) : (
        evaluation.state === 'failed' && <Notice tone="caution">{evaluation.fault}</Notice>
      )}
      {connection === 'back' && <Notice tone="good">The connection is back.</Notice>}
      {storeFull && (
        <Notice tone="caution">
          This browser has no room for a draft, so what you type is safe only once it is kept.
        </Notice>
      )}
      {elsewhere && (
        <Notice tone="caution">
          This notebook is open in another tab as well, with text that is not saved there. Each tab
          keeps its own; save one, and the other is brought together with it.
        </Notice>
      )}
      {questions && (
        <Notice tone="caution">
          {questions.author} changed the same as you in version {questions.number}. Your text is on
          the sheet; theirs is in that version.{' '}
          <Button look="quiet" onClick={() => onPanel('conflict')}>
            Compare and choose
          </Button>
        </Notice>
      )}
      {found && sheet.dirty && !questions && (
        <Notice>
          What you typed here until <Moment at={found.at} /> had not been kept; it is on the sheet
          again.{' '}
          <Button look="quiet" onClick={sheet.forgetFound}>
            Go on with it
          </Button>
          <Button look="quiet" onClick={() => sheet.putAside()}>
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
      {sheet.dirty && saveState.kind === 'failed' && (
        <Notice tone={saveState.again ? 'caution' : 'fault'}>
          Not saved: {saveState.fault} Your text is still here
          {saveState.again ? '; it is tried again.' : ', and kept on this computer.'}
        </Notice>
      )}
    </div>
  );
}
