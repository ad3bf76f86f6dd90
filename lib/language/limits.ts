/** Sizes beyond which a source is refused with `limit-size` before any arithmetic starts. */
export const LANGUAGE_LIMITS = {
  /** Characters in one line. */
  lineLength: 20_000,
  /** Brackets, roots, exponents and signs inside one another. */
  nesting: 200,
  /** Lines that are not blank, in all cells together. */
  lines: 10_000,
  /** Factors of √ in a root exponent such as 1/8. */
  rootIndex: 64,
  /** Values in one list, those of the lists inside it included. */
  listItems: 1_000,
  /** Lists inside one another. */
  listDepth: 8,
  /** Operations of one line, those of the functions that it calls included. */
  operations: 50_000,
  /** Operations inside one another, through all the functions that are called: the deepest line alone has 600. */
  depth: 700,
} as const;

export type LanguageLimits = { readonly [name in keyof typeof LANGUAGE_LIMITS]: number };
