import { render, screen } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { beforeEach, describe, expect, it, vi } from 'vitest';
import { GROUPS } from '@/components/help/entries';
import { Filter, Filtered, answersFilter } from '@/components/help/filter';
import { putLines, withLines } from '@/components/help/put-lines';
import { findDraft, keepDraft, type DraftPlace } from '@/components/sheet/state/draft';
import { evaluateCells } from '@/lib/language';
import { CONSTANTS, DEGREE_PARTS, FORMS, FUNCTIONS, UNITS } from '@/lib/language/names';
import type { NotebookContent } from '@/lib/notebooks/content';

const entries = GROUPS.flatMap((group) => [...group.entries]);

describe('the reference', () => {
  it('has every word that the language keeps for itself, once and with a sample', () => {
    const ids = entries.map(({ id }) => id);
    expect(new Set(ids).size).toBe(ids.length);
    for (const word of [...FUNCTIONS, ...UNITS, ...CONSTANTS]) {
      const entry = entries.find(({ id }) => id === word.name);
      expect(entry, word.name).toMatchObject({ meaning: word.meaning });
      expect(entry?.sample, word.name).toBe(word.example);
    }
    for (const { form, meaning } of FORMS) {
      expect(
        entries.filter((entry) => entry.form === form && entry.meaning === meaning),
      ).toHaveLength(1);
    }
    for (const { meaning, example } of DEGREE_PARTS) {
      expect(entries).toContainEqual(expect.objectContaining({ meaning, sample: example }));
    }
    for (const { name, signature } of FUNCTIONS) {
      expect(entries.find(({ id }) => id === name)?.form).toBe(signature);
    }
  });

  it.each(entries.map(({ form, sample }) => [form, sample]))(
    'the sample of “%s” evaluates, and every statement in it is true',
    (_, sample) => {
      const results = evaluateCells([{ id: 'sample', source: sample }]).flatMap(
        (cell) => cell.results,
      );
      expect(results.length).toBeGreaterThan(0);
      for (const result of results) {
        expect(result).not.toMatchObject({ kind: 'error' });
        if (result.kind === 'truth') expect(result.truth.value).toBe(true);
      }
    },
  );

  it('is filtered by words in any order, whatever their case', async () => {
    expect(answersFilter('chord(R, angle) The straight line', 'LINE chord')).toBe(true);
    expect(answersFilter('chord(R, angle) The straight line', 'line arc')).toBe(false);
    expect(answersFilter('anything', '  ')).toBe(true);
    render(
      <Filter texts={['chord of a circle', 'sagitta of an arc']}>
        <Filtered texts={['chord of a circle']}>first</Filtered>
        <Filtered texts={['sagitta of an arc']}>second</Filtered>
      </Filter>,
    );
    await userEvent.type(screen.getByLabelText('Look for'), 'arc');
    expect(screen.getByText('first')).not.toBeVisible();
    expect(screen.getByText('second')).toBeVisible();
    expect(screen.getByRole('status')).toHaveTextContent('1 left');
    await userEvent.type(screen.getByLabelText('Look for'), ' zz');
    expect(screen.getByRole('status')).toHaveTextContent('Nothing has these words.');
  });
});

const content = (...sources: string[]): NotebookContent => ({
  format: 1,
  settings: { digits: 30, unit: 'mm', step: null, rounding: 'half-even' },
  cells: sources.map((source, index) => ({ id: `c${index}`, kind: 'dimension', source })),
});

const sourcesOf = (made: NotebookContent | null) => made?.cells.map(({ source }) => source);

describe('lines put into a notebook', () => {
  it('become its last dimension cell', () => {
    expect(sourcesOf(withLines(content('R = 1 mm'), 's = 2 R'))).toEqual(['R = 1 mm', 's = 2 R']);
  });

  it('never give a second value to a mark that is there', () => {
    const made = withLines(content('R = 1 mm\nq == R'), 'R = 1200 mm\nq = R\n2 R == R + R');
    expect(sourcesOf(made)?.[1]).toBe('q = R\n2 R == R + R');
    expect(withLines(content('R = 1 mm'), 'R = 1200 mm')).toBeNull();
  });
});

describe('putting lines in', () => {
  beforeEach(() => localStorage.clear());

  const answer = (status: number, body: unknown) =>
    new Response(JSON.stringify(body), { status, headers: { 'content-type': 'application/json' } });

  it('waits on a sheet that has unkept changes, and asks no server', async () => {
    const asked = vi.spyOn(globalThis, 'fetch');
    const draft = {
      base: 3,
      from: content(),
      content: content('a = 1'),
      at: '2026-01-01T00:00:00Z',
    };
    const place: DraftPlace = { notebook: 'n1', shelf: 'typing', tab: '' };
    keepDraft(localStorage, place, draft);
    expect(await putLines('n1', 'b = 2', localStorage)).toEqual({ kind: 'draft' });
    const kept = findDraft(localStorage, place);
    expect(sourcesOf(kept?.content ?? null)).toEqual(['a = 1', 'b = 2']);
    expect(kept).toMatchObject({ base: 3, from: content() });
    expect(asked).not.toHaveBeenCalled();
    asked.mockRestore();
  });

  it('builds on the version that somebody kept in between', async () => {
    const heads = [4, 5];
    const saved: { base: number; content: NotebookContent }[] = [];
    const asked = vi.spyOn(globalThis, 'fetch').mockImplementation((_, init) => {
      if (init?.method === 'GET') {
        return Promise.resolve(
          answer(200, { notebook: { version: heads.shift() }, content: content('a = 1') }),
        );
      }
      saved.push(JSON.parse(init?.body as string) as (typeof saved)[number]);
      return Promise.resolve(
        saved.length === 1
          ? answer(409, { code: 'stale-version', detail: 'Saved meanwhile.' })
          : answer(201, { number: 6 }),
      );
    });
    expect(await putLines('n2', 'b = 2', localStorage)).toEqual({ kind: 'version', number: 6 });
    expect(saved.map(({ base }) => base)).toEqual([4, 5]);
    expect(sourcesOf(saved[1]?.content ?? null)).toEqual(['a = 1', 'b = 2']);
    asked.mockRestore();
  });
});
