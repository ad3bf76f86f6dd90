import fc from 'fast-check';
import MarkdownIt from 'markdown-it';
import { describe, expect, it } from 'vitest';
import { headingsOf } from '@/components/sheet/note-headings';

const markdown = new MarkdownIt();

/** The headings at the top level as markdown-it, which sets the notes, finds them. */
function headingsSet(source: string) {
  const tokens = markdown.parse(source, {});
  return tokens.flatMap(({ type, tag, level }, index) =>
    type === 'heading_open' && level === 0
      ? [
          {
            level: Number(tag.slice(1)),
            text: (tokens[index + 1]?.content ?? '')
              .replace(/[*_`$]/g, '')
              .replace(/\s*\n\s*/g, ' '),
          },
        ]
      : [],
  );
}

const lines = fc.constantFrom(
  '',
  'Ring',
  'of *seventeen* lights',
  '# Pitch',
  '## Foils ##',
  '###',
  '#none',
  '####### seven',
  '  # in',
  '    # code',
  '===',
  '---',
  '--',
  '```',
  '~~~~',
  '``` js',
);

describe('headings of a note', () => {
  it('are those that are set', () => {
    fc.assert(
      fc.property(fc.array(lines, { maxLength: 9 }), (some) => {
        const source = some.join('\n');
        expect(headingsOf(source)).toEqual(headingsSet(source));
      }),
      { numRuns: 2000 },
    );
  });

  it('are none in lists and quotations', () => {
    expect(headingsOf('- item\n---\n> said\n===\n1. one\n===')).toEqual([]);
  });
});
