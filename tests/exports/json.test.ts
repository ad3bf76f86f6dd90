import { describe, expect, it } from 'vitest';
import { CAUTION, notebookDocument, writeNotebookJson } from '@/lib/exports/index';
import { SAMPLE, evaluated } from './sample';

describe('the JSON of a notebook', () => {
  const results = evaluated(SAMPLE);
  const document = notebookDocument(SAMPLE, results, '0.1.0');

  it('names the notebook, its version and its settings', () => {
    expect(document).toMatchObject({
      schema: 1,
      engine: '0.1.0',
      notebook: { id: 'n-17', title: SAMPLE.title, workshop: 'Ferrowick Yard' },
      version: { number: 3, author: 'Ida Marrack', savedAt: '2026-03-02T09:30:00.000Z' },
      settings: { digits: 30, unit: 'mm', step: '0.5 mm', rounding: 'half-even' },
      caution: CAUTION,
    });
  });

  it('keeps every cell in order, with results for dimension cells only', () => {
    expect(document.cells.map(({ id, kind }) => `${id} ${kind}`)).toEqual([
      'a note',
      's section',
      'b dimension',
      'c dimension',
      'd dimension',
    ]);
    expect('results' in (document.cells[0] ?? {})).toBe(false);
    expect(document.cells.slice(2).map((cell) => cell.results)).toEqual(
      results.map((cell) => cell.results),
    );
  });

  it('keeps the heading of a section and the settings of a cell', () => {
    const cells = [
      { id: 's', kind: 'section' as const, source: 'Stones' },
      { id: 't', kind: 'dimension' as const, source: '1', settings: { digits: 3 } },
    ];
    expect(notebookDocument({ ...SAMPLE, cells }, [], '0.1.0').cells).toEqual([
      { id: 's', kind: 'section', source: 'Stones' },
      { id: 't', kind: 'dimension', source: '1', settings: { digits: 3 }, results: [] },
    ]);
  });

  it('gives the results of a cell that was not evaluated as none', () => {
    expect(notebookDocument(SAMPLE, [], '0.1.0').cells[2]?.results).toEqual([]);
  });

  it('is the same data as text', () => {
    expect(JSON.parse(writeNotebookJson(SAMPLE, results, '0.1.0'))).toEqual(
      JSON.parse(JSON.stringify(document)),
    );
  });

  it('takes over nothing from a notebook object but its own fields', () => {
    const fuller = { ...SAMPLE, secret: 'x', cells: [{ ...SAMPLE.cells[1], secret: 'x' }] };
    expect(writeNotebookJson(fuller as unknown as typeof SAMPLE, results, '0.1.0')).not.toContain(
      'secret',
    );
  });
});
