import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { joinAfter, joinBefore, replaceLine } from '@/components/sheet/state/line-edits';

const source = 'R = 1200 mm\ns = R/2\n# end';
const line = fc.string().map((text) => text.replace(/[\r\n]/g, ''));

describe('an edit of one line', () => {
  it('leaves the other lines and the cursor where they were', () => {
    expect(replaceLine(source, 1, 's = R/3', 7)).toEqual({
      source: 'R = 1200 mm\ns = R/3\n# end',
      line: 1,
      column: 7,
    });
  });

  it('breaks a line in two and goes on in the second', () => {
    expect(replaceLine(source, 0, 'R = 1200\n mm', 9)).toEqual({
      source: 'R = 1200\n mm\ns = R/2\n# end',
      line: 1,
      column: 0,
    });
  });

  it('takes pasted lines, the cursor at the end of the paste', () => {
    expect(replaceLine('', 0, 'a = 1\nb = 2\nc', 13)).toEqual({
      source: 'a = 1\nb = 2\nc',
      line: 2,
      column: 1,
    });
  });

  it('joins a line to the one before, or the one after to it', () => {
    expect(joinBefore(source, 1)).toEqual({
      source: 'R = 1200 mms = R/2\n# end',
      line: 0,
      column: 11,
    });
    expect(joinAfter(source, 1)).toEqual({
      source: 'R = 1200 mm\ns = R/2# end',
      line: 1,
      column: 7,
    });
    expect(joinBefore(source, 0)).toBeNull();
    expect(joinAfter(source, 2)).toBeNull();
  });

  it('joining undoes breaking, wherever a line is broken', () => {
    fc.assert(
      fc.property(fc.array(line, { minLength: 1 }), fc.nat(), fc.nat(), (lines, which, where) => {
        const at = which % lines.length;
        const own = lines[at] ?? '';
        const cut = where % (own.length + 1);
        const whole = lines.join('\n');
        const broken = replaceLine(whole, at, `${own.slice(0, cut)}\n${own.slice(cut)}`, cut + 1);
        expect(broken).toMatchObject({ line: at + 1, column: 0 });
        expect(joinBefore(broken.source, broken.line)).toEqual({
          source: whole,
          line: at,
          column: cut,
        });
      }),
    );
  });
});
