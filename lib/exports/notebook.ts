import type { Result, Settings } from '@/lib/language/index';
import type { TitleBlock } from '@/lib/notebooks/title-block';
import type { RevisionLine } from '@/lib/notebooks/types';

/** A notebook as its exports need it: one version, with what is printed in a title block. */
export interface ExportedNotebook {
  readonly id: string;
  readonly title: string;
  /** Name of the workshop. */
  readonly workshop: string;
  readonly version: {
    readonly number: number;
    /** Name of the person who saved it. */
    readonly author: string;
    /** Time of saving in UTC, ISO 8601. */
    readonly savedAt: string;
  };
  readonly settings: Settings;
  readonly cells: readonly ExportedCell[];
  /** Only of an issued revision, with its title block as it was frozen. */
  readonly revision?: ExportedRevision;
  readonly titleBlock?: TitleBlock;
}

/** What an issued revision says of itself; the engine's version is told with the results. */
export type ExportedRevision = Omit<RevisionLine, 'version' | 'engine' | 'issuedBy'> & {
  readonly issuedBy?: string;
};

export interface ExportedCell {
  readonly id: string;
  readonly kind: 'dimension' | 'note' | 'section';
  /** Of a section, its heading. */
  readonly source: string;
  /** What a dimension cell is given in instead of the notebook's settings. */
  readonly settings?: Partial<Settings> | undefined;
}

/** What the evaluation gave: results by the id of their cell. Only dimension cells have them. */
export type ExportedResults = readonly {
  readonly id: string;
  readonly results: readonly Result[];
}[];

/** Said wherever figures leave the product. */
export const CAUTION =
  'Exact numbers do not make a structure safe. Stability, loads, fixings, glass and stair compliance belong to licensed ' +
  'designers and local codes; lifting and handling to trained people. Measure the opening before cutting, and cut and try ' +
  'one piece before a batch.';

/** Results of a cell by its id; none when it was not evaluated. */
export function resultsOf(cell: ExportedCell, results: ExportedResults): readonly Result[] {
  return results.find(({ id }) => id === cell.id)?.results ?? [];
}
