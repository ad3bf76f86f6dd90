interface Word {
  name: string;
  meaning: string;
}

/** Words with their meaning, two columns that become one on a narrow screen. */
export function WordTable({ words }: { words: readonly Word[] }) {
  return (
    <dl className="border-t border-hairline">
      {words.map(({ name, meaning }) => (
        <div
          key={name}
          className="grid gap-x-6 border-b border-hairline py-1.5 sm:grid-cols-[13rem_minmax(0,1fr)]"
        >
          <dt className="font-mono text-source">{name}</dt>
          <dd>{meaning}</dd>
        </div>
      ))}
    </dl>
  );
}
