/**
 * The text of a comment: plain, with simple line breaks. A person who is mentioned stands in it by id, as `@{…}`, so
 * that two people of one name are told apart and a name that changes is shown as it is now. Runs in the browser too.
 */
export const COMMENT_LIMITS = {
  /** UTF-16 units of a comment; a mention counts as one. */
  length: 2_000,
  /** People mentioned in one comment. */
  mentions: 20,
} as const;

const MENTION = /@\{([0-9a-f]{8}-[0-9a-f]{4}-[0-9a-f]{4}-[0-9a-f]{4}-[0-9a-f]{12})\}/g;

export type CommentPiece =
  | { readonly kind: 'text'; readonly text: string }
  | { readonly kind: 'person'; readonly id: string };

/** How a mention stands in the text of a comment. */
export const mentionOf = (personId: string) => `@{${personId}}`;

/** A comment cut into what is said and whom it mentions, in order. */
export function piecesOf(comment: string): CommentPiece[] {
  const pieces: CommentPiece[] = [];
  let end = 0;
  for (const found of comment.matchAll(MENTION)) {
    if (found.index > end) pieces.push({ kind: 'text', text: comment.slice(end, found.index) });
    pieces.push({ kind: 'person', id: found[1] ?? '' });
    end = found.index + found[0].length;
  }
  if (end < comment.length) pieces.push({ kind: 'text', text: comment.slice(end) });
  return pieces;
}

/** The ids of those who are mentioned, each once. */
export function mentionedIn(comment: string): string[] {
  return [...new Set(piecesOf(comment).flatMap((one) => (one.kind === 'person' ? [one.id] : [])))];
}

/** UTF-16 units, a mention counted as one. */
export const lengthOfComment = (comment: string) => comment.replace(MENTION, '@').length;

/** The text as people read it: every mention as `@` and the name. */
export function readableComment(comment: string, nameOf: (personId: string) => string): string {
  return piecesOf(comment)
    .map((piece) => (piece.kind === 'text' ? piece.text : `@${nameOf(piece.id)}`))
    .join('');
}
