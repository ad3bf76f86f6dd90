import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { rememberByText } from '@/lib/language/remember-by-text';

describe('a function whose answers are remembered by their text', () => {
  it('answers every text as the function itself does, however many came between', () => {
    const text = fc.oneof(
      fc.constantFrom('a', 'b', 'R = 2 mm', ''),
      fc.integer({ min: 1, max: 90_000 }).map((length) => 'x'.repeat(length)),
    );
    fc.assert(
      fc.property(fc.array(text, { maxLength: 60 }), (texts) => {
        const remembered = rememberByText((one) => ({ said: `of ${one}` }));
        for (const one of texts) expect(remembered(one).said).toBe(`of ${one}`);
      }),
      { numRuns: 50 },
    );
  });

  it('does not work again for the texts of a notebook that is asked for again and again', () => {
    let worked = 0;
    const remembered = rememberByText((text) => {
      worked += 1;
      return { text };
    });
    const cells = Array.from({ length: 1000 }, (_, k) => `m${k} = ${k} mm + 1/3 in`);
    for (let request = 0; request < 50; request += 1) cells.forEach((text) => remembered(text));
    expect(worked).toBe(cells.length);
  });

  it('forgets what was not asked for while much else was', () => {
    let worked = 0;
    const remembered = rememberByText((text) => {
      worked += 1;
      return { text };
    });
    remembered('once');
    for (let k = 0; k < 30; k += 1) remembered(String(k).repeat(20_000));
    const before = worked;
    remembered('once');
    expect(worked).toBe(before + 1);
  });
});
