import { describe, expect, it } from 'vitest';
import { STARTERS, type Starter } from '@/components/starters/sheets';
import { evaluateCells, type Result } from '@/lib/language';
import { NotebookContent } from '@/lib/notebooks/content';

function evaluated({ cells, settings }: Starter): Result[] {
  const dimensions = cells.filter(({ kind }) => kind === 'dimension');
  return evaluateCells(dimensions, settings).flatMap(({ results }) => results);
}

/**
 * Twelve significant digits, from 60-digit arithmetic on the radical forms of the same quantities,
 * apart from this engine: a ring of 17 voussoirs between radii of 2050 and 2400 mm with joints of
 * 4 mm, seventeen lights on a radius of 1500 mm with mullions of 60 mm, a fifteen-fold court of four
 * courses 1500 mm wide.
 */
const OUTSIDE: Record<Starter['name'], Record<string, string>> = {
  voussoirs: { v_in: '749.440772113', v_out: '878.065486872' },
  tracery: {
    p: '551.248553450',
    f: '245.624276725',
    k2: '1083.72499856',
    k3: '1579.29648863',
    k4: '2021.08693094',
    k5: '2394.05168184',
    k6: '2685.48987407',
    k7: '2885.47692952',
    k8: '2987.20252889',
  },
  pavement: {
    a1: '623.735072453',
    a2: '1247.47014491',
    a3: '1871.20521736',
    a4: '2494.94028981',
    h4: '131.114395597',
    outline: '37424.1043472',
    short: '0.604347196681',
  },
};

describe.each(STARTERS)('the starter “$title”', (starter) => {
  it('is content that a notebook may hold', () => {
    const { cells, settings } = starter;
    expect(NotebookContent.safeParse({ format: 1, settings, cells }).error).toBeUndefined();
    expect(cells.filter(({ kind }) => kind === 'note').length).toBeGreaterThan(0);
  });

  it('has no line that is an error, and every statement on it is true', () => {
    const results = evaluated(starter);
    expect(results.filter(({ kind }) => kind === 'error')).toEqual([]);
    const truths = results.filter((result) => result.kind === 'truth');
    expect(truths.map(({ truth }) => truth.value)).toEqual(truths.map(() => true));
    expect(truths.length).toBeGreaterThan(0);
  });

  it('gives lengths with cut sizes to its cutting step', () => {
    const lengths = evaluated(starter).filter(
      (result) => result.kind === 'number' && result.unit === 'mm',
    );
    expect(lengths.length).toBeGreaterThan(4);
    for (const length of lengths) {
      expect(length).toMatchObject({ cut: { step: starter.settings.step } });
    }
  });

  it('gives the figures computed outside for the same quantities', () => {
    const settings = { ...starter.settings, digits: 12 };
    const found = Object.fromEntries(
      evaluated({ ...starter, settings }).flatMap((result) =>
        result.kind === 'number' && result.mark !== null ? [[result.mark, result.decimal.re]] : [],
      ),
    );
    expect(found).toMatchObject(OUTSIDE[starter.name]);
  });
});
