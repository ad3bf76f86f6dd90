/** How many letters there are; after Z comes AA. */
const LETTERS = 26;

/** The letters of the n-th revision, n from 1: A … Z, AA, AB … */
export function letterOf(ordinal: number): string {
  const rest = Math.floor((ordinal - 1) / LETTERS);
  const last = String.fromCharCode(65 + ((ordinal - 1) % LETTERS));
  return rest === 0 ? last : letterOf(rest) + last;
}

/** Whether a text can be the letters of a revision at all. */
export const isLetter = (text: string): boolean => /^[A-Z]{1,4}$/.test(text);
