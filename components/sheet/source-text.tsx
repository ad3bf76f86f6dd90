interface SourceLineProps {
  text: string;
  error?: { from: number; to: number } | null;
}

interface Piece {
  text: string;
  faulty: boolean;
}

/** A line of source cut where its error begins and ends; an empty place is shown by its neighbour. */
export function piecesOf(text: string, error: { from: number; to: number } | null): Piece[] {
  if (error === null) return [{ text, faulty: false }];
  const from = Math.max(0, Math.min(error.from, text.length - 1));
  const to = Math.min(text.length, Math.max(error.to, from + 1));
  return [
    { text: text.slice(0, from), faulty: false },
    { text: text.slice(from, to), faulty: true },
    { text: text.slice(to), faulty: false },
  ].filter((piece) => piece.text !== '');
}

/** A line of source as it stands on the sheet: an error underlined at its place, a remark quieter. */
export function SourceLine({ text, error = null }: SourceLineProps) {
  const remark = text.indexOf('#');
  const code = remark < 0 ? text : text.slice(0, remark);
  return (
    <code className="block whitespace-pre-wrap font-mono text-source [overflow-wrap:anywhere]">
      {text === '' && '\u200b'}
      {piecesOf(code, code === '' ? null : error).map((piece, index) =>
        piece.faulty ? (
          <span
            key={index}
            className="bg-ruddle-wash text-ruddle underline decoration-wavy decoration-1 underline-offset-4"
          >
            {piece.text}
          </span>
        ) : (
          <span key={index}>{piece.text}</span>
        ),
      )}
      {remark >= 0 && <span className="text-soft">{text.slice(remark)}</span>}
    </code>
  );
}

export const errorOf = (
  result: { kind: string; error?: { from: number; to: number } } | undefined,
) => (result?.kind === 'error' ? (result.error ?? null) : null);

export const linesOf = (source: string): string[] => source.split(/\r?\n/);
