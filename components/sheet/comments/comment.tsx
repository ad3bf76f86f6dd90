'use client';

import { useState } from 'react';
import { piecesOf } from '@/lib/notebooks/comment-text';
import type { CommentLine } from '@/lib/notebooks/types';
import { sayFault } from '@/components/ui/ask';
import { Button } from '@/components/ui/button';
import { Moment } from '@/components/ui/moment';
import { Notice } from '@/components/ui/notice';
import { Composer } from './composer';
import { asTyped, type Mentionable } from './mention-text';
import type { CommentDeeds } from './comment-deeds';

interface CommentProps {
  comment: CommentLine;
  names: Readonly<Record<string, string>>;
  people: readonly Mentionable[];
  /** Whether the person may change and withdraw it. */
  own: boolean;
  deeds: CommentDeeds;
}

type Doing = 'reading' | 'changing' | 'withdrawing';

/** One thing said: by whom, when, and the text as it was typed. */
export function Comment({ comment, names, people, own, deeds }: CommentProps) {
  const [doing, setDoing] = useState<Doing>('reading');
  const [fault, setFault] = useState<string | null>(null);

  const withdraw = async () => {
    setFault(null);
    await deeds.withdraw(comment.id).catch((refused: unknown) => {
      setFault(sayFault(refused));
    });
    setDoing('reading');
  };

  return (
    <div className="space-y-1">
      <p className="text-small text-soft">
        <span className="font-semibold text-ink">{comment.author.name}</span>{' '}
        <Moment at={comment.saidAt} />
        {comment.editedAt !== null && !comment.withdrawn && ' · changed since'}
      </p>
      {comment.withdrawn ? (
        <p className="italic text-soft">Withdrawn</p>
      ) : doing === 'changing' ? (
        <Composer
          label="Change what you wrote"
          does="Keep"
          about={`change-${comment.id}`}
          first={asTyped(comment.text, people, names)}
          people={people}
          autoFocus
          onCancel={() => setDoing('reading')}
          onSend={(text) => deeds.change(comment.id, text).then(() => setDoing('reading'))}
        />
      ) : (
        <p className="whitespace-pre-wrap [overflow-wrap:anywhere]">
          {piecesOf(comment.text).map((piece, index) =>
            piece.kind === 'text' ? (
              piece.text
            ) : (
              <span key={index} className="font-medium text-snapline">
                @{names[piece.id] ?? 'somebody'}
              </span>
            ),
          )}
        </p>
      )}
      {fault && <Notice tone="fault">{fault}</Notice>}
      {own && !comment.withdrawn && doing === 'reading' && (
        <div className="flex gap-x-2">
          <Button look="quiet" className="-ml-1.5" onClick={() => setDoing('changing')}>
            Change
          </Button>
          <Button look="quiet" onClick={() => setDoing('withdrawing')}>
            Withdraw
          </Button>
        </div>
      )}
      {doing === 'withdrawing' && (
        <div role="group" aria-label="Withdraw this comment" className="flex items-center gap-2">
          <span className="text-small">Nobody will read it any more.</span>
          <Button look="warn" autoFocus onClick={() => void withdraw()}>
            Withdraw it
          </Button>
          <Button look="quiet" onClick={() => setDoing('reading')}>
            Leave it
          </Button>
        </div>
      )}
    </div>
  );
}
