/** Zone letters leave out I and O, which read as figures (ISO 5457). */
const LETTERS = 'ABCDEFGHJKLMNPQRSTUVWXYZ';

/** The letter of a zone counted from 0; after Z come AA, AB … */
export function zoneLetter(zone: number): string {
  const last = LETTERS[zone % LETTERS.length] ?? '';
  return zone < LETTERS.length ? last : zoneLetter(Math.floor(zone / LETTERS.length) - 1) + last;
}

/** Zones along the side are as tall as this; the strip is cut off where the sheet ends. */
export const ZONE_REM = 13;

/** The letter of the zone in which an element of a sheet begins, as it is laid out now. */
export function findZone(element: Element | null): string | null {
  const frame = element?.closest('[data-sheet]');
  if (!element || !frame) return null;
  const rem = parseFloat(getComputedStyle(document.documentElement).fontSize);
  const below = element.getBoundingClientRect().top - frame.getBoundingClientRect().top;
  return zoneLetter(Math.max(0, Math.floor(below / (ZONE_REM * rem))));
}
