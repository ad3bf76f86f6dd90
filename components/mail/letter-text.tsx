const ADDRESS = /^https?:\/\/\S+$/;

/** A letter's text as it was sent; an address on a line of its own can be followed. */
export function LetterText({ text }: { text: string }) {
  return (
    <div
      tabIndex={0}
      role="group"
      aria-label="Text of the letter"
      className="overflow-x-auto border border-rule bg-sheet p-4 font-mono text-small whitespace-pre-wrap [overflow-wrap:anywhere]"
    >
      {text
        .trimEnd()
        .split('\n')
        .map((line, index) => (
          <div key={index} className="min-h-[1.4em]">
            {ADDRESS.test(line) ? (
              <a href={line} className="text-snapline underline underline-offset-4">
                {line}
              </a>
            ) : (
              line
            )}
          </div>
        ))}
    </div>
  );
}
