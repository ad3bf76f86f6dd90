import type { CellSettings, NotebookCell, NotebookContent } from '../content';

export function sameContent(a: NotebookContent, b: NotebookContent): boolean {
  if (a === b) return true;
  return (
    sameSettings(a.settings, b.settings) &&
    a.cells.length === b.cells.length &&
    a.cells.every((cell, index) => sameCell(cell, b.cells[index]))
  );
}

export function sameCell(
  a: NotebookCell | null | undefined,
  b: NotebookCell | null | undefined,
): boolean {
  if (a === b) return true;
  return (
    a?.id === b?.id &&
    a?.kind === b?.kind &&
    a?.source === b?.source &&
    sameSettings(a?.settings ?? {}, b?.settings ?? {})
  );
}

function sameSettings(one: CellSettings, two: CellSettings): boolean {
  return (
    one.digits === two.digits &&
    one.unit === two.unit &&
    one.step === two.step &&
    one.rounding === two.rounding
  );
}
