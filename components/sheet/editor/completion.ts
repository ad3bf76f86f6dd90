import type { Completion, CompletionContext, CompletionResult } from '@codemirror/autocomplete';
import { CONSTANTS, FUNCTIONS, UNITS } from '@/lib/language/names';

/** A mark of the sheet, with its size as the index of marks shows it. */
export interface KnownMark {
  name: string;
  size: string;
}

const WORDS: readonly Completion[] = [
  ...FUNCTIONS.map(({ name, signature, meaning }) => ({
    label: name,
    detail: signature.slice(name.length),
    info: meaning,
    apply: `${name}(`,
  })),
  ...[...UNITS, ...CONSTANTS].map(({ name, meaning }) => ({ label: name, detail: meaning })),
];

/** A name begins so; shorter ones are typed faster than chosen. */
const NAME = /[\p{L}][\p{L}\p{N}_]*/u;
const SHORTEST = 2;

/** Offers marks of the sheet, then the words of the language; nothing where the word is whole. */
export function completeFrom(marks: () => readonly KnownMark[]) {
  return (context: CompletionContext): CompletionResult | null => {
    const before = context.matchBefore(NAME);
    const remark = context.state.sliceDoc(0, context.pos).includes('#');
    if (remark || (!before && !context.explicit)) return null;
    const word = before?.text ?? '';
    if (word.length < SHORTEST && !context.explicit) return null;
    const options: Completion[] = [
      ...marks().map(({ name, size }) => ({ label: name, detail: size, boost: 10 })),
      ...WORDS,
    ];
    if (options.some(({ label }) => label === word)) return null;
    return { from: before?.from ?? context.pos, options, validFor: /^[\p{L}\p{N}_]*$/u };
  };
}
