import { createContext, useContext } from 'react';

/** How many threads stand on a cell. */
export interface ThreadCount {
  open: number;
  resolved: number;
}

export interface SheetComments {
  /** By the id of the cell; cells without threads are not in it. */
  counts: ReadonlyMap<string, ThreadCount>;
  /** Open threads on the whole notebook, on cells that have gone too. */
  open: number;
  mayWrite: boolean;
  /** Shows the threads of a cell, or with null those of the whole notebook. */
  show: (cell: string | null) => void;
}

export const CommentsContext = createContext<SheetComments | null>(null);

/** The comments of the sheet on the screen; null where a sheet has none, as for clients. */
export const useCommentsOnSheet = () => useContext(CommentsContext);

export const COMMENTS_BUTTON = 'sheet-comments';
export const commentMarkId = (cell: string) => `comments-${cell}`;
