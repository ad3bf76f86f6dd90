import type { NotebookContent } from '@/lib/notebooks/content';
import { settingsField } from '@/lib/notebooks/content-values';
import { linesOf } from '../source-text';
import { linesNeededBy, type Place } from '../state/uses';

/**
 * What is asked of the evaluation for one line alone: the line with the settings of its cell and the
 * digits wanted, and the lines that it needs with as few digits as can be, so that they cost little.
 */
export function questionOfLine(content: NotebookContent, at: Place, digits: number) {
  const cell = content.cells.find(({ id }) => id === at.id);
  const needed = linesNeededBy(content.cells, at);
  const own = { id: 'asked', source: linesOf(cell?.source ?? '')[at.line] ?? '' };
  return {
    cells: [
      ...(needed.length > 0 ? [{ id: 'needed', source: needed.join('\n') }] : []),
      { ...own, settings: { ...settingsField(cell?.settings).settings, digits } },
    ],
    settings: { ...content.settings, digits: 1 },
  };
}

/** What is asked of the server for the certificate of one line. */
export function certificateQuestion(content: NotebookContent, at: Place) {
  const { cells, settings } = questionOfLine(content, at, content.settings.digits);
  return { cells, settings, at: { cell: 'asked', line: 1 } };
}
