import {
  CONSTANTS,
  DEGREE_PARTS,
  FORMS,
  FUNCTIONS,
  GROUPS as FUNCTION_GROUPS,
  UNITS,
  type FormWord,
  type FunctionWord,
} from '@/lib/language/names';
import { MORE_FORMS } from './text';

/** One word or form of the cell language as the reference shows it. */
export interface Entry {
  /** Anchor on the page. */
  id: string;
  /** What is written, as it is written. */
  form: string;
  meaning: string;
  parameters: readonly (readonly [name: string, meaning: string])[];
  /** Lines that show it at work. */
  sample: string;
}

export interface Group {
  id: string;
  title: string;
  entries: readonly Entry[];
}

/** Forms stand apart from the words, whose anchors are the words themselves. */
const formEntry = ({ name, form, meaning, example }: FormWord): Entry => ({
  id: `form-${name.replace(/[^A-Za-z0-9]+/g, '-')}`,
  form,
  meaning,
  parameters: [],
  sample: example,
});

const functionEntry = ({ name, signature, meaning, parameters, example }: FunctionWord): Entry => ({
  id: name,
  form: signature,
  meaning,
  parameters: Object.entries(parameters),
  sample: example,
});

const nameEntry = (word: { name: string; meaning: string; example: string }): Entry => ({
  id: word.name,
  form: word.name,
  meaning: word.meaning,
  parameters: [],
  sample: word.example,
});

/** Everything that can be written in a dimension cell, in the order of the page. */
export const GROUPS: readonly Group[] = [
  {
    id: 'forms',
    title: 'How a line is written',
    entries: [...FORMS, ...MORE_FORMS].map(formEntry),
  },
  ...FUNCTION_GROUPS.map(({ name, title }) => ({
    id: name,
    title,
    entries: FUNCTIONS.filter(({ group }) => group === name).map(functionEntry),
  })),
  {
    id: 'units',
    title: 'Units',
    entries: [
      ...UNITS.map(nameEntry),
      ...DEGREE_PARTS.map((part) => ({
        ...nameEntry(part),
        id: `part-${part.name}`,
        form: `${part.name}, ${part.sign}`,
      })),
    ],
  },
  { id: 'constants', title: 'Constants', entries: CONSTANTS.map(nameEntry) },
];
