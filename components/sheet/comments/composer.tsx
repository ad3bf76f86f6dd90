'use client';

import { useId, useLayoutEffect, useRef, useState, type KeyboardEvent } from 'react';
import { COMMENT_LIMITS, lengthOfComment } from '@/lib/notebooks/comment-text';
import { sayFault } from '@/components/ui/ask';
import { Button } from '@/components/ui/button';
import { Notice } from '@/components/ui/notice';
import { useCommentDraft } from './comment-draft';
import { MentionList } from './mention-list';
import {
  findBeginning,
  labelOf,
  offersFor,
  withMentions,
  type Beginning,
  type Mentionable,
} from './mention-text';

interface ComposerProps {
  label: string;
  /** The word on the button that sends. */
  does: string;
  /** What it is about, in this notebook: a text that was not sent is found again under it. */
  about: string;
  /** The text to begin from. */
  first?: string;
  people: readonly Mentionable[];
  autoFocus?: boolean;
  /** Sends the text with its mentions; what it throws is shown, and the text stays. */
  onSend: (text: string) => Promise<unknown>;
  onCancel?: () => void;
}

/** From so many characters before the limit on, how many are left is said. */
const NEAR = 200;

/** A box for a comment; `@` offers the people on the notebook. */
export function Composer(props: ComposerProps) {
  const { label, does, about, first = '', people, autoFocus = false, onSend, onCancel } = props;
  const [text, write] = useCommentDraft(about, first);
  const [beginning, setBeginning] = useState<Beginning | null>(null);
  const [chosen, setChosen] = useState(0);
  const [fault, setFault] = useState<string | null>(null);
  const [busy, setBusy] = useState(false);
  const box = useRef<HTMLTextAreaElement>(null);
  /** Where the `@` stands whose offers were closed. */
  const waved = useRef<number | null>(null);
  /** Where the cursor goes once the name that was taken is in the box. */
  const cursor = useRef<number | null>(null);
  const id = useId();

  // Before the next key can arrive, or it would be written in the wrong place.
  useLayoutEffect(() => {
    if (cursor.current === null) return;
    box.current?.focus();
    box.current?.setSelectionRange(cursor.current, cursor.current);
    cursor.current = null;
  }, [text]);

  const offers = beginning === null ? [] : offersFor(beginning.text, people);
  const sent = withMentions(text.trim(), people);
  const left = COMMENT_LIMITS.length - lengthOfComment(sent);

  const look = (element: HTMLTextAreaElement) => {
    const next = findBeginning(element.value, element.selectionEnd);
    // What was waved away stays so, however the cursor moves within it.
    if (next?.from !== waved.current) waved.current = null;
    setBeginning(waved.current === null ? next : null);
    setChosen(0);
  };

  const take = (person: Mentionable) => {
    if (beginning === null) return;
    const label = `@${labelOf(person, people)} `;
    const end = beginning.from + 1 + beginning.text.length;
    const next = text.slice(0, beginning.from) + label + text.slice(end).replace(/^ /, '');
    write(next);
    setBeginning(null);
    cursor.current = beginning.from + label.length;
  };

  const send = async () => {
    if (sent === '' || left < 0 || busy) return;
    setBusy(true);
    setFault(null);
    try {
      await onSend(sent);
      write(first);
    } catch (refused) {
      setFault(sayFault(refused));
    }
    setBusy(false);
  };

  const onKey = (event: KeyboardEvent) => {
    if (event.nativeEvent.isComposing) return;
    const offer = offers[chosen];
    if (offer) {
      const by = event.key === 'ArrowDown' ? 1 : event.key === 'ArrowUp' ? -1 : null;
      if (by !== null) setChosen((chosen + by + offers.length) % offers.length);
      else if (event.key === 'Enter' || event.key === 'Tab') take(offer);
      else if (event.key === 'Escape') {
        waved.current = beginning?.from ?? null;
        setBeginning(null);
      } else return;
      event.preventDefault();
      return;
    }
    if (event.key === 'Enter' && (event.ctrlKey || event.metaKey)) {
      event.preventDefault();
      void send();
    } else if (event.key === 'Escape' && onCancel) {
      event.preventDefault();
      onCancel();
    }
  };

  return (
    <form
      className="space-y-2"
      onSubmit={(event) => {
        event.preventDefault();
        void send();
      }}
    >
      <label htmlFor={id} className="block text-small font-medium">
        {label}
      </label>
      <div className="relative">
        <textarea
          ref={box}
          id={id}
          rows={3}
          autoFocus={autoFocus}
          value={text}
          aria-describedby={`${id}-hint`}
          aria-autocomplete="list"
          aria-controls={offers.length > 0 ? `${id}-people` : undefined}
          aria-activedescendant={offers.length > 0 ? `${id}-people-${chosen}` : undefined}
          onChange={(event) => {
            write(event.target.value);
            look(event.target);
          }}
          onSelect={(event) => look(event.currentTarget)}
          onKeyDown={onKey}
          onBlur={() => setBeginning(null)}
          className="w-full rounded-cut border border-rule bg-sheet px-3 py-1.5 text-base text-ink"
        />
        {offers.length > 0 && (
          <MentionList
            id={`${id}-people`}
            offers={offers}
            people={people}
            chosen={chosen}
            onTake={take}
          />
        )}
      </div>
      <p role="status" className="sr-only">
        {offers.length > 0 &&
          `${offers.length} ${offers.length === 1 ? 'person' : 'people'} to mention; the arrows choose, Enter takes.`}
      </p>
      {fault && <Notice tone="fault">{fault}</Notice>}
      <div className="flex flex-wrap items-center justify-between gap-2">
        <p id={`${id}-hint`} className={`text-small ${left < 0 ? 'text-ruddle' : 'text-soft'}`}>
          {left < NEAR
            ? left < 0
              ? `${-left} ${left === -1 ? 'character' : 'characters'} too many`
              : `${left} characters left`
            : '@ mentions somebody, who gets a letter.'}
        </p>
        <span className="flex gap-2">
          {onCancel && (
            <Button look="quiet" onClick={onCancel}>
              Leave it
            </Button>
          )}
          <Button type="submit" look="main" disabled={busy || sent === '' || left < 0}>
            {busy ? 'Sending…' : does}
          </Button>
        </span>
      </div>
    </form>
  );
}
