import { render, screen } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { afterEach, describe, expect, it, vi } from 'vitest';
import ConflictDialog from '@/components/sheet/panels/conflict-dialog';
import { mergeContents, type Side } from '@/lib/notebooks/merge';
import { contentOf, dimension } from './sample';
import { numberResult } from './sample-results';

afterEach(() => vi.unstubAllGlobals());

const base = contentOf(dimension('a', 'R = 1'), dimension('b', 'S = 1'), dimension('c', 'n = 8'));
const mine = contentOf(dimension('a', 'R = 2'), dimension('b', 'S = 1'));
const theirs = contentOf(dimension('a', 'R = 3'), dimension('b', 'S = 9'), dimension('c', 'n = 9'));
const { content, conflicts } = mergeContents(base, mine, theirs);

describe('the question about what both changed', () => {
  it('shows both texts with what each comes to, and answers with one choice for each', async () => {
    HTMLDialogElement.prototype.showModal ??= function (this: HTMLDialogElement) {
      this.setAttribute('open', '');
    };
    vi.stubGlobal('fetch', (_: string, { body }: { body: string }) => {
      const { cells } = JSON.parse(body) as { cells: { id: string; source: string }[] };
      const answered = cells.map(({ id, source }) => {
        const text = source.slice(4);
        const exact = { text: `${text}00`, tex: text, staged: false };
        return { id, results: [numberResult({ mark: 'R', source, unit: null, exact })] };
      });
      return Promise.resolve(Response.json({ cells: answered }));
    });
    const answer = vi.fn<(sides: ReadonlyMap<string, Side>) => void>();
    render(
      <ConflictDialog
        content={content}
        questions={{ author: 'Tam Osgood', number: 5, savedAt: '2026-01-02T03:04:05Z', conflicts }}
        state={{ kind: 'idle' }}
        onAnswer={answer}
        onTakeTheirs={vi.fn()}
        onClose={vi.fn()}
      />,
    );
    expect(
      screen.getAllByRole('group').map((one) => one.querySelector('legend')?.textContent),
    ).toEqual([
      'Dimension cell 1, changed by both',
      'Dimension cell 3, taken out by you and changed by them',
    ]);
    await screen.findByText('200');
    await screen.findByText('300');
    const user = userEvent.setup();
    await user.click(screen.getAllByRole('radio', { name: /Tam Osgood/ })[0]!);
    await user.click(screen.getByRole('button', { name: 'Save what is chosen' }));
    expect(Object.fromEntries(answer.mock.lastCall?.[0] ?? [])).toEqual({
      'cell:a': 'theirs',
      'cell:c': 'mine',
    });
    await user.click(screen.getByRole('button', { name: 'Choose all of theirs' }));
    await user.click(screen.getByRole('button', { name: 'Save what is chosen' }));
    expect([...(answer.mock.lastCall?.[0].values() ?? [])]).toEqual(['theirs', 'theirs']);
  });
});
