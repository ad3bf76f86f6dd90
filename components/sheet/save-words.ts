import type { NotebookOnScreen } from './state/use-notebook';

/** How it stands with the sheet, calmly: what is saved, what is being saved, what could not be. */
export function saveWords({
  kept,
  dirty,
  saveState,
  questions,
}: Pick<NotebookOnScreen, 'kept' | 'dirty' | 'saveState' | 'questions'>): string {
  if (saveState.kind === 'keeping') return 'saving…';
  if (dirty && saveState.kind === 'failed') return 'not saved';
  if (dirty && questions !== null)
    return `Saved as version ${kept.number}, but for what is asked above the sheet`;
  if (dirty) return `Changed since version ${kept.number}`;
  return kept.byItself === true
    ? `Saved as version ${kept.number}`
    : `Version ${kept.number}, kept`;
}
