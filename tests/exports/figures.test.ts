import katex from 'katex';
import { describe, expect, it } from 'vitest';
import { cellTex } from '@/lib/exports/tex';
import { writeNotebookJson } from '@/lib/exports/index';
import { evaluateCells } from '@/lib/language/index';
import { SAMPLE } from './sample';

const source =
  'P = polar(1200 mm, turn/12)\ng = line(P, point(0, 0))\nc = circle(P, 60 mm)\nQ = meet(g, c, 1)\nV = polar(1 m, turn/257)';
const cell = { id: 'f', kind: 'dimension' as const, source };
const notebook = { ...SAMPLE, cells: [cell] };
const evaluated = evaluateCells(notebook.cells, notebook.settings);
const results = evaluated[0]?.results ?? [];

describe('figures in exports', () => {
  it('TeX gives a point as a pair and a line by its equation, with every part in words', () => {
    const tex = cellTex(cell, results);
    expect(tex).toContain('=\\left(600\\sqrt{3},\\;600\\right)\\,\\mathrm{mm}\\]');
    expect(tex).toContain(':\\quad x-\\sqrt{3}y=0\\]');
    expect(tex).toContain('\\textbf{x:} $1039.2');
    expect(tex).toContain('\\textbf{Radius:} $60\\,\\mathrm{mm}$, exactly');
    expect(tex).toContain('\\textbf{Reach:} All its parts are built from');
    for (const [, formula = ''] of tex.matchAll(/\\\[([^]*?)\\\]/g))
      katex.renderToString(formula, { throwOnError: true, strict: 'ignore', displayMode: true });
  });

  it('JSON gives the results as the language does', () => {
    const document = JSON.parse(writeNotebookJson(notebook, evaluated, 'x')) as {
      cells: { results: unknown }[];
    };
    expect(document.cells[0]?.results).toEqual(JSON.parse(JSON.stringify(results)));
    expect(results.map(({ kind }) => kind)).toEqual(['point', 'line', 'circle', 'point', 'point']);
  });
});
