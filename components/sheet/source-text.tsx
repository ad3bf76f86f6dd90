import type { Result } from './result';

interface SourceTextProps {
  source: string;
  results: readonly Result[];
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

/** The source of a cell as it stands on the sheet, errors underlined at their place. */
export function SourceText({ source, results }: SourceTextProps) {
  const errors = new Map(
    results.map((result) => [result.line, result.kind === 'error' ? result.error : null]),
  );
  return (
    <code className="block whitespace-pre-wrap font-mono text-source [overflow-wrap:anywhere]">
      {source.split(/\r?\n/).map((text, index) => (
        <span key={index} className={`block ${/^\s*#/.test(text) ? 'text-soft' : ''}`}>
          {text === ''
            ? '\u200b'
            : piecesOf(text, errors.get(index + 1) ?? null).map((piece, at) =>
                piece.faulty ? (
                  <span
                    key={at}
                    className="bg-ruddle-wash text-ruddle underline decoration-wavy decoration-1 underline-offset-4"
                  >
                    {piece.text}
                  </span>
                ) : (
                  <span key={at}>{piece.text}</span>
                ),
              )}
        </span>
      ))}
    </code>
  );
}
