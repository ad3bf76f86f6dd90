import type { NotebookContent } from '@/lib/notebooks/content';
import type { OpenNotebook } from '@/lib/notebooks/types';
import { newCellId } from '@/components/sheet/state/changes';
import { keepDraft, listTyping, type Store } from '@/components/sheet/state/draft';
import { claimTab, listOpenTabs } from '@/components/sheet/state/tab';
import { ask, Refusal } from '@/components/ui/ask';

/** The mark that a line defines, or null. */
function definedBy(line: string): string | null {
  return /^\s*(\p{L}[\p{L}\p{N}_]*)\s*(?:\([^)]*\)\s*)?=(?!=)/u.exec(line)?.[1] ?? null;
}

const definitionsOf = (source: string) =>
  source.split(/\r?\n/).flatMap((line) => definedBy(line) ?? []);

/**
 * The lines as a new dimension cell at the end. A mark that the notebook has already keeps its own
 * value: the line that would give it another one is left out. Null when no line is left.
 */
export function withLines(content: NotebookContent, lines: string): NotebookContent | null {
  const taken = new Set(
    content.cells.flatMap(({ kind, source }) =>
      kind === 'dimension' ? definitionsOf(source) : [],
    ),
  );
  const left = lines.split('\n').filter((line) => {
    const mark = definedBy(line);
    return mark === null || !taken.has(mark);
  });
  if (left.length === 0) return null;
  const cell = { id: newCellId(), kind: 'dimension' as const, source: left.join('\n') };
  return { ...content, cells: [...content.cells, cell] };
}

export type PutAnswer =
  | { kind: 'version'; number: number }
  /** The sheet has changes that are not kept yet; the lines wait among them. */
  | { kind: 'draft' }
  | { kind: 'nothing' };

/**
 * Puts lines into a notebook as a new version, or onto its sheet in this browser where that has
 * changes of its own. Somebody else's version in between is built upon.
 * @throws Refusal
 */
export async function putLines(id: string, lines: string, store: Store): Promise<PutAnswer> {
  const waiting = await findWaiting(store, id);
  if (waiting) {
    const { tab, draft } = waiting;
    const content = withLines(draft.content, lines);
    if (content === null) return { kind: 'nothing' };
    const place = { notebook: id, shelf: 'typing', tab } as const;
    if (keepDraft(store, place, { ...draft, content })) return { kind: 'draft' };
  }
  try {
    return await append(id, lines);
  } catch (fault) {
    if (fault instanceof Refusal && fault.code === 'stale-version') return append(id, lines);
    throw fault;
  }
}

/** A draft that no sheet on the screen goes on with: of this tab, which shows another page, or of a closed one. */
async function findWaiting(store: Store, id: string) {
  const [own, open] = [await claimTab(), await listOpenTabs()];
  return listTyping(store, id).find(({ tab }) => tab === own || !open.has(tab));
}

async function append(id: string, lines: string): Promise<PutAnswer> {
  const path = `/api/notebooks/${id}`;
  const { notebook, content: head } = await ask<OpenNotebook>(path);
  const content = withLines(head, lines);
  if (content === null) return { kind: 'nothing' };
  const [first = ''] = lines.split('\n');
  const body = { base: notebook.version, content, note: `From the reference: ${first}` };
  const { number } = await ask<{ number: number }>(`${path}/versions`, { body });
  return { kind: 'version', number };
}
