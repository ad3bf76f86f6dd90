import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { safeNextPath } from '@/lib/accounts/next-path';

describe('the way back after signing in', () => {
  it.each([
    ['/notebooks/1?x=2#c', '/notebooks/1?x=2#c'],
    ['/settings', '/settings'],
    ['/a/../settings', '/settings'],
    [null, '/notebooks'],
    [undefined, '/notebooks'],
    ['', '/notebooks'],
    ['notebooks', '/notebooks'],
    ['https://elsewhere.example/', '/notebooks'],
    ['//elsewhere.example', '/notebooks'],
    ['/\\elsewhere.example', '/notebooks'],
    ['/\t/elsewhere.example', '/notebooks'],
    ['/.//elsewhere.example', '/notebooks'],
    ['javascript:alert(1)', '/notebooks'],
  ])('%j leads to %j', (wished, expected) => {
    expect(safeNextPath(wished)).toBe(expected);
  });

  it('never leads to another site, whatever is wished', () => {
    const piece = fc.constantFrom('/', '\\', '.', '..', '@', ':', '//', 'a', '%2f', '?', '#', '\t');
    const wish = fc.oneof(
      fc.string(),
      fc.array(piece).map((pieces) => pieces.join('')),
    );
    fc.assert(
      fc.property(wish, (wished) => {
        const here = 'https://surdwork.example';
        expect(new URL(safeNextPath(wished), here).origin).toBe(here);
      }),
    );
  });
});
