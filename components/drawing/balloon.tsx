interface BalloonProps {
  /** The mark, `=` for a decision, or null for a value without a name. */
  sign: string | null;
  faulty?: boolean;
}

/** Splits `k_12` or `k12` into the letter and what hangs below it, as marks are lettered. */
export function splitMark(mark: string): { stem: string; below: string } {
  const match = /^(.+?)_?(\d+)$/u.exec(mark);
  return match ? { stem: match[1] ?? mark, below: match[2] ?? '' } : { stem: mark, below: '' };
}

/** A mark lettered as on a drawing: italic, its figures as a subscript. */
export function Mark({ mark }: { mark: string }) {
  const { stem, below } = splitMark(mark);
  return (
    <span className="font-serif italic">
      {stem}
      {below && <sub className="text-[0.7em] not-italic">{below}</sub>}
    </span>
  );
}

/** Long marks are lettered smaller, so that the balloon keeps to the margin. */
function letterSize(sign: string): string {
  if (sign.length <= 3) return 'text-figure';
  return sign.length <= 6 ? 'text-base' : 'text-small';
}

/** The mark in its balloon in the margin, with the leader that ends in a dot at the value. */
export function Balloon({ sign, faulty = false }: BalloonProps) {
  const edge = faulty ? 'border-ruddle text-ruddle' : 'border-ink';
  return (
    <div className="flex h-balloon items-center" aria-hidden={sign === null}>
      {sign === null ? (
        <span className={`ml-3 size-3 rounded-full border ${edge}`} />
      ) : (
        <span
          className={`flex h-balloon min-w-balloon max-w-[4.75rem] shrink-0 items-center justify-center overflow-hidden rounded-full border bg-sheet px-1.5 leading-none ${letterSize(sign)} ${edge}`}
          title={sign}
        >
          <span className="truncate px-0.5 pb-0.5">
            <Mark mark={sign} />
          </span>
        </span>
      )}
      <span className={`h-px min-w-1 grow border-t ${edge}`} />
      <span className={`size-1.5 shrink-0 rounded-full ${faulty ? 'bg-ruddle' : 'bg-ink'}`} />
    </div>
  );
}
