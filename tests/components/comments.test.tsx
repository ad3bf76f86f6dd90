import { fireEvent, render, screen } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import fc from 'fast-check';
import { describe, expect, it, vi } from 'vitest';
import { CommentMark } from '@/components/sheet/comments/comment-mark';
import { CommentsContext, type SheetComments } from '@/components/sheet/comments/comments-context';
import { Composer } from '@/components/sheet/comments/composer';
import {
  asTyped,
  findBeginning,
  labelOf,
  offersFor,
  withMentions,
  type Mentionable,
} from '@/components/sheet/comments/mention-text';
import { lengthOfComment, mentionOf, mentionedIn, piecesOf } from '@/lib/notebooks/comment-text';

const person = (n: number, name: string): Mentionable => ({
  id: `00000000-0000-4000-8000-${String(n).padStart(12, '0')}`,
  name,
  email: `p${n}@yard.example`,
});
const ash = person(1, 'Ash Rill');
const other = person(2, 'Ash Rill');
const ashley = person(3, 'Ash');
const zoe = person(4, 'Zoë Orme');
const people = [ash, other, ashley, zoe];
const names = Object.fromEntries(people.map(({ id, name }) => [id, name]));

describe('mentions in what is typed', () => {
  it('tell namesakes apart by their addresses, and nobody else', () => {
    expect(people.map((one) => labelOf(one, people))).toEqual([
      'Ash Rill (p1@yard.example)',
      'Ash Rill (p2@yard.example)',
      'Ash',
      'Zoë Orme',
    ]);
    const text = '@Ash Rill (p2@yard.example) and @Ash, not @Ashes or ash@yard.example';
    expect(mentionedIn(withMentions(text, people))).toEqual([other.id, ashley.id]);
  });

  it('come back as they were typed', () => {
    const piece = fc.oneof(
      fc.constantFrom(...people).map((one) => `@${labelOf(one, people)}`),
      fc.constantFrom(' ', '\n', ', please ', ' (see R) '),
    );
    fc.assert(
      fc.property(fc.array(piece), (parts) => {
        const typed = parts.join(' ');
        expect(asTyped(withMentions(typed, people), people, names)).toBe(typed);
      }),
    );
  });

  it('are pieces of the text, of which none is lost', () => {
    fc.assert(
      fc.property(fc.string(), fc.string(), (before, behind) => {
        const text = `${before}${mentionOf(zoe.id)}${behind}`;
        const back = piecesOf(text)
          .map((piece) => (piece.kind === 'text' ? piece.text : mentionOf(piece.id)))
          .join('');
        expect(back).toBe(text);
        expect(lengthOfComment(text)).toBe(before.length + 1 + behind.length);
      }),
    );
  });

  it('begin behind a blank and not within an address', () => {
    expect(findBeginning('see @as', 7)).toEqual({ from: 4, text: 'as' });
    expect(findBeginning('@', 1)).toEqual({ from: 0, text: '' });
    expect(findBeginning('p1@yard', 7)).toBeNull();
    expect(findBeginning('@ash\nrill', 9)).toBeNull();
  });

  it('are offered by any part of the name, without accents and case', () => {
    expect(offersFor('orm', people)).toEqual([zoe]);
    expect(offersFor('zoe', people)).toEqual([zoe]);
    expect(offersFor('', people)).toEqual(people);
    expect(offersFor('ill', people)).toEqual([]);
  });
});

describe('the box for a comment', () => {
  const open = (onSend: (text: string) => Promise<unknown>, about: string) => {
    render(<Composer label="Say" does="Send" about={about} people={people} onSend={onSend} />);
    return screen.getByLabelText<HTMLTextAreaElement>('Say');
  };

  it('offers people by the keyboard and sends them by id', async () => {
    const onSend = vi.fn(() => Promise.resolve());
    const box = open(onSend, 'one');
    const user = userEvent.setup();
    await user.type(box, 'Ask @ri');
    expect(screen.getAllByRole('option')).toHaveLength(2);
    await user.keyboard('{ArrowDown}{Enter}');
    expect(box).toHaveValue('Ask @Ash Rill (p2@yard.example) ');
    expect(screen.queryByRole('option')).toBeNull();
    await user.keyboard('now{Control>}{Enter}{/Control}');
    expect(onSend).toHaveBeenCalledWith(`Ask ${mentionOf(other.id)} now`);
    expect(box).toHaveValue('');
  });

  it('closes the offers with Escape, and does not open them again for the same name', async () => {
    const box = open(() => Promise.resolve(), 'escape');
    const user = userEvent.setup();
    await user.type(box, 'Ask @ri');
    expect(screen.getAllByRole('option')).toHaveLength(2);
    await user.keyboard('{Escape}');
    fireEvent.select(box);
    await user.type(box, 'l');
    expect(screen.queryByRole('option')).toBeNull();
    await user.type(box, ' and @zo');
    expect(screen.getAllByRole('option')).toHaveLength(1);
  });

  it('keeps the text when it is refused, and says why', async () => {
    const box = open(() => Promise.reject(new Error('The notebook is archived.')), 'two');
    const user = userEvent.setup();
    await user.type(box, 'Hello');
    await user.click(screen.getByRole('button', { name: 'Send' }));
    expect(await screen.findByText('The notebook is archived.')).toBeInTheDocument();
    expect(box).toHaveValue('Hello');
  });

  it('does not send what is empty or too long', () => {
    const box = open(() => Promise.resolve(), 'three');
    expect(screen.getByRole('button', { name: 'Send' })).toBeDisabled();
    fireEvent.change(box, { target: { value: 'x'.repeat(2001) } });
    expect(screen.getByText('1 character too many')).toBeInTheDocument();
    expect(screen.getByRole('button', { name: 'Send' })).toBeDisabled();
  });
});

describe('the mark in the margin', () => {
  const mark = (comments: Partial<SheetComments>) =>
    render(
      <CommentsContext
        value={{ counts: new Map(), open: 0, mayWrite: true, show: () => undefined, ...comments }}
      >
        <CommentMark id="c1" name="Note 1" reachable={false} />
      </CommentsContext>,
    );

  it('says in words how many threads are open, or that all are resolved', () => {
    mark({ counts: new Map([['c1', { open: 2, resolved: 1 }]]) });
    expect(screen.getByRole('button').getAttribute('aria-label')).toBe(
      'Note 1: 2 open threads of comments',
    );
    mark({ counts: new Map([['c1', { open: 0, resolved: 1 }]]) });
    expect(
      screen.getByRole('button', { name: 'Note 1: 1 resolved thread of comments' }),
    ).toBeInTheDocument();
  });

  it('is not there for whoever may not write, where nothing was said, nor without comments', () => {
    mark({ mayWrite: false });
    render(<CommentMark id="c1" name="Note 1" reachable />);
    expect(screen.queryByRole('button')).toBeNull();
  });
});
