/** Characters of texts in one generation; what is worked out of a text takes some hundred times its room. */
const GENERATION = 200_000;
/** An entry has its price whatever its text. */
const ENTRY = 20;

/**
 * A function of a text alone, with what it gave for the texts seen last kept: of a notebook that is evaluated at every
 * pause of the typing all but one are the same as before. What it gives must not be changed by anyone. Two generations
 * of texts are kept; when the younger is full the older goes, but for what was asked for meanwhile. So a text that is
 * found costs one look, and no order of use is kept.
 */
export function rememberByText<T extends object>(work: (text: string) => T): (text: string) => T {
  let younger = new Map<string, T>();
  let older = new Map<string, T>();
  let room = 0;
  return (text) => {
    const known = younger.get(text);
    if (known !== undefined) return known;
    const given = older.get(text) ?? work(text);
    younger.set(text, given);
    room += text.length + ENTRY;
    if (room > GENERATION) {
      older = younger;
      younger = new Map();
      room = 0;
    }
    return given;
  };
}
