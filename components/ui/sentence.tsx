/** A sentence in which what stands between backticks is source. */
export function Sentence({ text }: { text: string }) {
  return text.split('`').map((part, index) =>
    index % 2 === 1 ? (
      <code key={index} className="font-mono text-[0.94em]">
        {part}
      </code>
    ) : (
      <span key={index}>{part}</span>
    ),
  );
}
