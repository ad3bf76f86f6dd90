/** A cutting step is a length; a bare number is taken in the unit given. Empty is no step. */
export function readStep(text: string, unit: string): { step: string | null } | { fault: string } {
  const trimmed = text.trim();
  if (trimmed === '') return { step: null };
  const match = /^(\d+(?:\.\d+)?(?:\/\d+)?)\s*(mm|cm|m|in|ft)?$/.exec(trimmed);
  const [, size, written] = match ?? [];
  if (size === undefined || !/[1-9]/.test(size) || /\/0*$/.test(size)) {
    return { fault: `“${trimmed}” is not a length; write a step such as 0.5 mm or 1/64 in.` };
  }
  return { step: `${size} ${written ?? unit}` };
}
