import { findHunks } from '@/lib/notebooks/merge';

interface MarkedSourceProps {
  source: string;
  /** The text it is compared with. */
  other: string;
  /** How what only this text has is marked: struck where it went, underlined where it came or merely differs. */
  sign: 'gone' | 'come' | 'differs';
}

const SIGNS = {
  gone: 'bg-ruddle-wash line-through decoration-ruddle decoration-2',
  come: 'bg-lichen-wash underline decoration-lichen decoration-2 underline-offset-4',
  differs: 'bg-ochre-wash underline decoration-ochre decoration-2 underline-offset-4',
} as const;

/** A source with the words marked that another has otherwise; never by colour alone. */
export function MarkedSource({ source, other, sign }: MarkedSourceProps) {
  return (
    <code className="block whitespace-pre-wrap font-mono text-small [overflow-wrap:anywhere]">
      {source === '' && <span className="text-soft">(empty)</span>}
      {markedPieces(source, other).map(({ text, differs }, index) => {
        if (!differs) return <span key={index}>{text}</span>;
        const look = SIGNS[sign];
        if (sign === 'gone') {
          return (
            <del key={index} className={look}>
              {text}
            </del>
          );
        }
        return sign === 'come' ? (
          <ins key={index} className={look}>
            {text}
          </ins>
        ) : (
          <mark key={index} className={`text-ink ${look}`}>
            {text}
          </mark>
        );
      })}
    </code>
  );
}

const WORD = /\p{L}[\p{L}\d_]*|\d+(?:\.\d+)?|\s+|./gsu;

/** A text in pieces: what the other has as well, and what it has not. */
export function markedPieces(source: string, other: string): { text: string; differs: boolean }[] {
  const words = source.match(WORD) ?? [];
  const pieces: { text: string; differs: boolean }[] = [];
  let at = 0;
  for (const { from, to } of findHunks(words, other.match(WORD) ?? [])) {
    pieces.push({ text: words.slice(at, from).join(''), differs: false });
    pieces.push({ text: words.slice(from, to).join(''), differs: true });
    at = to;
  }
  pieces.push({ text: words.slice(at).join(''), differs: false });
  return pieces.filter(({ text }) => text !== '');
}
