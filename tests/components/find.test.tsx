import { render, screen } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import fc from 'fast-check';
import { beforeAll, describe, expect, it, vi } from 'vitest';
import { FindBar } from '@/components/sheet/find/find-bar';
import { findHits, firstFrom, replaceHits } from '@/components/sheet/find/find-hits';
import { RenameDialog } from '@/components/sheet/rename/rename-dialog';
import { contentOf, dimension, note } from './sample';

beforeAll(() => {
  // Layout and dialogs are the browser's; jsdom has neither.
  Element.prototype.scrollIntoView = () => undefined;
  HTMLDialogElement.prototype.showModal = function showModal(this: HTMLDialogElement) {
    this.open = true;
  };
});

const content = contentOf(
  dimension('a', 'R = 1200 mm # outer radius\ns = 2R sin(turn/34)'),
  note('n', 'The radius R\nis given.'),
  dimension('b', 'rise = R/2'),
);
const anywhere = (text: string) => ({ text, marksOnly: false });

describe('finding on a sheet', () => {
  it('looks into sources, remarks and notes, capital or small, and tells line and column', () => {
    const hits = findHits(content.cells, anywhere('RADIUS'));
    expect(hits.map(({ id, line, column }) => [id, line, column])).toEqual([
      ['a', 0, 20],
      ['n', 0, 4],
    ]);
  });

  it('finds only the mark of just this name, where it is defined or read', () => {
    const hits = findHits(content.cells, { text: 'R', marksOnly: true });
    expect(hits.map(({ id, line, column }) => [id, line, column])).toEqual([
      ['a', 0, 0],
      ['a', 1, 5],
      ['b', 0, 7],
    ]);
  });

  it('every hit holds what was looked for, whatever signs that is made of', () => {
    const text = fc.string({ minLength: 1, maxLength: 3, unit: fc.constantFrom(...'aR.*(√[\\-') });
    const source = fc.string({ maxLength: 30, unit: fc.constantFrom(...'aR.*(√[\\-\n') });
    fc.assert(
      fc.property(source, text, (written, wanted) => {
        const cells = [dimension('a', written)];
        for (const hit of findHits(cells, anywhere(wanted))) {
          expect(written.slice(hit.from, hit.to).toLowerCase()).toBe(wanted.toLowerCase());
          expect(written.split('\n')[hit.line]?.slice(hit.column)).toBe(
            written.slice(hit.from).split('\n')[0],
          );
        }
        const parts = written.toLowerCase().split(wanted.toLowerCase());
        expect(findHits(cells, anywhere(wanted))).toHaveLength(parts.length - 1);
      }),
    );
  });

  it('begins at the cell in hand, and at the start where nothing follows', () => {
    const hits = findHits(content.cells, anywhere('radius'));
    expect(firstFrom(hits, content.cells, 'n')).toBe(1);
    expect(firstFrom(hits, content.cells, 'b')).toBe(0);
    expect(firstFrom(hits, content.cells, null)).toBe(0);
  });

  it('replaces the hits it is given and leaves other cells the same objects', () => {
    const hits = findHits(content.cells, anywhere('radius'));
    const replaced = replaceHits(content.cells, hits, 'ray');
    expect(replaced.map(({ source }) => source)).toEqual([
      'R = 1200 mm # outer ray\ns = 2R sin(turn/34)',
      'The ray R\nis given.',
      'rise = R/2',
    ]);
    expect(replaced[2]).toBe(content.cells[2]);
  });
});

describe('the strip in which one looks', () => {
  function open(over: Partial<Parameters<typeof FindBar>[0]> = {}) {
    const calls = {
      onQuery: vi.fn(),
      onShow: vi.fn(),
      onReplace: vi.fn(),
      onTake: vi.fn(),
      onClose: vi.fn(),
    };
    render(
      <FindBar
        content={content}
        request={{ by: 0, number: 1 }}
        last={anywhere('')}
        near={null}
        mayWrite
        {...calls}
        {...over}
      />,
    );
    return { ...calls, user: userEvent.setup() };
  }

  it('has the focus, counts while one types, steps on and back, and closes on Escape', async () => {
    const { user, onClose, onTake } = open();
    expect(screen.getByRole('textbox')).toHaveFocus();
    await user.keyboard('radius');
    expect(screen.getByRole('status')).toHaveTextContent('1 of 2, in cell 1');
    await user.keyboard('{Enter}');
    expect(screen.getByRole('status')).toHaveTextContent('2 of 2, in cell 2');
    await user.keyboard('{Enter}{Shift>}{Enter}{/Shift}');
    expect(screen.getByRole('status')).toHaveTextContent('2 of 2, in cell 2');
    await user.keyboard('{Control>}{Enter}{/Control}');
    expect(onTake).toHaveBeenCalledWith(expect.objectContaining({ id: 'n', column: 4 }));
    await user.keyboard('zz');
    expect(screen.getByRole('status')).toHaveTextContent('Not on this sheet');
    await user.keyboard('{Escape}');
    expect(onClose).toHaveBeenCalledOnce();
  });

  it('replaces all in one change', async () => {
    const { user, onReplace } = open({ last: anywhere('radius') });
    await user.click(screen.getByRole('button', { name: 'Replace' }));
    await user.type(screen.getByLabelText('by'), 'ray');
    await user.click(screen.getByRole('button', { name: 'All 2' }));
    expect(onReplace).toHaveBeenCalledOnce();
  });

  it('offers no change to whoever only reads', () => {
    open({ mayWrite: false, last: anywhere('R') });
    expect(screen.queryByRole('button', { name: 'Replace' })).toBeNull();
    expect(screen.getByRole('button', { name: 'Next' })).toBeEnabled();
  });
});

describe('asking for another name', () => {
  function open() {
    const onRename = vi.fn();
    render(<RenameDialog mark="R" content={content} onRename={onRename} onClose={vi.fn()} />);
    const field = screen.getByLabelText('New name');
    return { onRename, user: userEvent.setup(), field };
  }

  it('says in how many places of how many cells it stands, and changes them all at once', async () => {
    const { user, field, onRename } = open();
    expect(field).toHaveAccessibleDescription(/R stands in 3 places in 2 cells/);
    await user.clear(field);
    await user.type(field, 'outer{Enter}');
    const [[changed, name, places]] = onRename.mock.calls as [[typeof content, string, number]];
    expect([name, places]).toEqual(['outer', 3]);
    expect(changed.cells.map(({ source }) => source)).toEqual([
      'outer = 1200 mm # outer radius\ns = 2outer sin(turn/34)',
      'The radius R\nis given.',
      'rise = outer/2',
    ]);
  });

  it('refuses a taken name in a sentence and offers a free one', async () => {
    const { user, field, onRename } = open();
    await user.clear(field);
    await user.type(field, 's{Enter}');
    expect(screen.getByRole('status')).toHaveTextContent('s is another mark of this sheet.');
    expect(onRename).not.toHaveBeenCalled();
    await user.click(screen.getByRole('button', { name: 'Take s_2' }));
    expect(field).toHaveValue('s_2');
  });
});
