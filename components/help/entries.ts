import { CONSTANTS, FUNCTIONS, UNITS } from '@/lib/language/names';
import { SAMPLES } from './samples';
import { FORMS } from './text';

/** One word or form of the cell language as the reference shows it. */
export interface Entry {
  /** Anchor on the page. */
  id: string;
  /** What is written, as it is written. */
  form: string;
  meaning: string;
  parameters: readonly (readonly [name: string, meaning: string])[];
  /** Lines that show it at work, or null. */
  sample: string | null;
}

export interface Group {
  id: string;
  title: string;
  entries: readonly Entry[];
}

interface Word {
  name: string;
  meaning: string;
  signature?: string;
  parameters?: Readonly<Record<string, string>>;
}

const entryOf = (word: Word): Entry => ({
  id: word.name,
  form: word.signature ?? word.name,
  meaning: word.meaning,
  parameters: Object.entries(word.parameters ?? {}),
  sample: SAMPLES[word.name] ?? null,
});

/** An anchor for a form, apart from those of the words, which are the words themselves. */
const anchorOf = (name: string) => `form-${name.replace(/[^A-Za-z0-9]+/g, '-')}`;

/** Everything that can be written in a dimension cell, in the order of the page. */
export const GROUPS: readonly Group[] = [
  {
    id: 'forms',
    title: 'How a line is written',
    entries: FORMS.map(({ name, form, meaning, example }) => ({
      id: anchorOf(name),
      form,
      meaning,
      parameters: [],
      sample: example,
    })),
  },
  { id: 'functions', title: 'Functions', entries: FUNCTIONS.map(entryOf) },
  { id: 'units', title: 'Units', entries: UNITS.map(entryOf) },
  { id: 'constants', title: 'Constants', entries: CONSTANTS.map(entryOf) },
];
