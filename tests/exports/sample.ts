import { evaluateCells } from '@/lib/language/index';
import type { ExportedNotebook } from '@/lib/exports/index';

const settings = { digits: 30, unit: 'mm', step: '0.5 mm', rounding: 'half-even' } as const;

/** A notebook of an invented workshop with every kind of result in it. */
export const SAMPLE: ExportedNotebook = {
  id: 'n-17',
  title: 'A seventeen-light window',
  workshop: 'Ferrowick Yard',
  version: { number: 3, author: 'Ida Marrack', savedAt: '2026-03-02T09:30:00.000Z' },
  settings,
  cells: [
    {
      id: 'a',
      kind: 'note',
      source:
        '# Pitch\n\nLights on a circle of radius $R$; the angle is $\\frac{2\\pi}{17}$.\n\n- first *point*\n- **datum** at `0`',
    },
    { id: 's', kind: 'section', source: 'Lights & 100 % of \\stones {' },
    {
      id: 'b',
      kind: 'dimension',
      source: 'R = 1500 mm\npitch = 2 R sin(turn/34)  # one light\nalpha = turn/17\nalpha_1 = 30°',
    },
    {
      id: 'c',
      kind: 'dimension',
      source:
        'pitch == chord(R, alpha)\npitch > 551.3 mm\nq = 1/0\n(2 + \nR_1 = pi R\nz = 2 + 3 i\nR R',
    },
    {
      id: 'd',
      kind: 'dimension',
      source: 'big = cos(2 pi/257)\nlong = sqrt(2)^7 + 10^80 + 1/3\nw = (1+sqrt(2)) mm',
    },
  ],
};

export function evaluated(notebook: ExportedNotebook) {
  const cells = notebook.cells.filter((cell) => cell.kind === 'dimension');
  return evaluateCells(cells, notebook.settings);
}
