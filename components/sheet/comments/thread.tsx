'use client';

import { useState } from 'react';
import type { CommentThread } from '@/lib/notebooks/types';
import { sayFault } from '@/components/ui/ask';
import { Button } from '@/components/ui/button';
import { Moment } from '@/components/ui/moment';
import { Notice } from '@/components/ui/notice';
import { Comment } from './comment';
import { Composer } from './composer';
import type { CommentDeeds } from './comment-deeds';
import type { Mentionable } from './mention-text';

export interface ThreadProps {
  thread: CommentThread;
  /** Names of those who are mentioned, by id. */
  names: Readonly<Record<string, string>>;
  people: readonly Mentionable[];
  personId: string;
  mayWrite: boolean;
  mayResolve: boolean;
  deeds: CommentDeeds;
}

/** What was said about a cell and what was answered, oldest first. */
export function Thread(props: ThreadProps) {
  const { thread, names, people, personId, mayWrite, mayResolve, deeds } = props;
  const [answering, setAnswering] = useState(false);
  const [fault, setFault] = useState<string | null>(null);
  const resolved = thread.resolvedAt !== null;
  const [first] = thread.comments;

  const resolve = async () => {
    setFault(null);
    await deeds.resolve(thread.id, !resolved).catch((refused: unknown) => {
      setFault(sayFault(refused));
    });
  };

  return (
    <article
      id={`thread-${thread.id}`}
      tabIndex={-1}
      aria-label={`Thread begun by ${first?.author.name ?? 'somebody'}${resolved ? ', resolved' : ''}`}
      className={`space-y-3 border-l-2 pl-3 outline-offset-4 ${resolved ? 'border-rule' : 'border-ruddle'}`}
    >
      <ol className="space-y-3">
        {thread.comments.map((comment) => (
          <li key={comment.id}>
            <Comment
              comment={comment}
              names={names}
              people={people}
              own={comment.author.id === personId && mayWrite}
              deeds={deeds}
            />
          </li>
        ))}
      </ol>
      {resolved && thread.resolvedAt !== null && (
        <p className="text-small text-lichen">
          <span aria-hidden="true">✓ </span>Resolved
          {thread.resolvedBy && ` by ${thread.resolvedBy}`}, <Moment at={thread.resolvedAt} />
        </p>
      )}
      {fault && <Notice tone="fault">{fault}</Notice>}
      {answering ? (
        <Composer
          label="Your answer"
          does="Answer"
          about={`thread-${thread.id}`}
          people={people}
          autoFocus
          onCancel={() => setAnswering(false)}
          onSend={(text) => deeds.answer(thread.id, text).then(() => setAnswering(false))}
        />
      ) : (
        <div className="flex flex-wrap gap-x-2">
          {mayWrite && !resolved && (
            <Button look="quiet" className="-ml-1.5" onClick={() => setAnswering(true)}>
              Answer
            </Button>
          )}
          {mayResolve && (
            <Button
              look="quiet"
              className={resolved ? '-ml-1.5' : ''}
              onClick={() => void resolve()}
            >
              {resolved ? 'Open again' : 'Resolve'}
            </Button>
          )}
        </div>
      )}
    </article>
  );
}
