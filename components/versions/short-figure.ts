import type { Result } from '@/components/sheet/result';
import { sayUnit } from '@/components/sheet/say-number';
import { sayDimension } from '@/components/sheet/wording';

/** The exact value as text with its unit; a statement's truth; why there is none. */
export function exactFigure(result: Result): string {
  switch (result.kind) {
    case 'error':
      return result.error.message;
    case 'truth':
      return result.truth.value ? 'true, exactly' : 'false, exactly';
    case 'function':
      return result.signature;
    case 'number':
      if (result.unit === null) return result.exact.text;
      return `${bracketed(result.exact.text)} ${sayUnit(result.unit)}`;
    default:
      return result.exact.text;
  }
}

const bracketed = (text: string) => (/[ +]/.test(text) ? `(${text})` : text);

/** The cut size, or the length as it is drawn, with which way it was rounded; null where there is none. */
export function cutFigure(result: Result): { figure: string; below: string } | null {
  return sayDimension(result);
}

/** Exact value and cut size in one line. */
export function shortFigure(result: Result): string {
  const exact = exactFigure(result);
  const cut = cutFigure(result)?.figure;
  return cut === undefined || cut === exact ? exact : `${exact}, cut ${cut}`;
}
