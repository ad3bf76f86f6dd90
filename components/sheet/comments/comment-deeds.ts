import { ask } from '@/components/ui/ask';

/** What can be done with comments. Each throws the server's refusal, and ends when the list has been fetched anew. */
export interface CommentDeeds {
  begin: (cell: string, text: string) => Promise<void>;
  answer: (thread: string, text: string) => Promise<void>;
  change: (comment: string, text: string) => Promise<void>;
  withdraw: (comment: string) => Promise<void>;
  resolve: (thread: string, resolved: boolean) => Promise<void>;
}

export function commentDeeds(notebookId: string, onChanged: () => Promise<unknown>): CommentDeeds {
  const path = `/api/notebooks/${notebookId}/comments`;
  const then = async (asked: Promise<unknown>) => {
    await asked;
    await onChanged();
  };
  const change = (id: string, body: object) =>
    then(ask(`${path}/${id}`, { method: 'PATCH', body }));
  return {
    begin: (cell, text) => then(ask(path, { body: { cell, text } })),
    answer: (thread, text) => then(ask(path, { body: { thread, text } })),
    change: (comment, text) => change(comment, { text }),
    withdraw: (comment) => then(ask(`${path}/${comment}`, { method: 'DELETE' })),
    resolve: (thread, resolved) => change(thread, { resolved }),
  };
}
