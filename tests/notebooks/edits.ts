import { database } from '@/db/client';
import type { Person } from '@/lib/accounts';
import type { NotebookContent } from '@/lib/notebooks/content';
import { dimension } from './people';

/** Takes a role away as somebody else would, meanwhile. */
export async function deleteRole(notebookId: string, { id }: Person): Promise<void> {
  await database()('notebook_roles').where({ notebook_id: notebookId, user_id: id }).delete();
}

/**
 * One of three edits that contradict nobody's: a line added to the cell that all write into, the writer's own cell
 * written on, a new cell. The line is in no other edit.
 */
export function newEdit(
  content: NotebookContent,
  writer: number,
  edit: number,
): { content: NotebookContent; line: string } {
  const line = `w${writer}e${edit} = ${edit} mm`;
  const { cells } = content;
  if (edit % 3 === 2) {
    const added = dimension(`new${writer}-${edit}`, line);
    return { line, content: { ...content, cells: [...cells, added] } };
  }
  const id = edit % 3 === 0 ? 'shared' : `own${writer}`;
  return {
    line,
    content: {
      ...content,
      cells: cells.map((cell) =>
        cell.id === id ? { ...cell, source: `${cell.source}\n${line}` } : cell,
      ),
    },
  };
}
